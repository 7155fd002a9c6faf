import type { Job, JobRow, JobStage } from '#contracts/jobs.ts';
import { tailgateSheet } from './sample-sheet.ts';

const minute = 60_000;
const sheetOf = { id: tailgateSheet.id, name: tailgateSheet.name, version: tailgateSheet.version };
const uuid = (group: number, n: number) =>
  `01958000-00${String(group).padStart(2, '0')}-7000-8000-${String(n).padStart(12, '0')}`;

const titles = ['Tailgate, electric', 'Door shell', 'Mirror caps', 'Front cover', 'Rocker panel, left', 'Hood'];
const states = ['running', 'planned', 'waiting', 'planned', 'done', 'withdrawn'] as const;

/** A row of the list; which one decides its title, state and how far it is. */
export function sampleRow(n: number, given: Partial<JobRow> = {}): JobRow {
  const state = states[n % states.length] ?? 'waiting';
  const done = { running: 3, planned: 0, waiting: 0, done: 8, withdrawn: 1 }[state];
  return {
    id: uuid(1, n),
    number: 2412 + n,
    title: titles[n % titles.length] ?? 'Panel',
    vehicle: n % 2 === 0 ? 'Estate, silver, KR 24 TB' : '',
    sheetName: n % 3 === 0 ? null : tailgateSheet.name,
    state,
    releaseAt: `2026-03-1${n % 3}T07:00:00.000Z`,
    promiseAt: n % 5 === 4 ? null : `2026-03-1${3 + (n % 4)}T15:00:00.000Z`,
    endsAt: state === 'planned' ? '2026-03-13T14:20:00.000Z' : null,
    late: n % 4 === 3,
    stagesDone: done,
    stagesTotal: 8,
    next:
      state === 'planned' || state === 'running'
        ? { title: 'Base and clear', startsAt: '2026-03-12T12:40:00.000Z', placeName: 'Booth 1' }
        : null,
    weight: n % 3 === 0 ? 6 : 1,
    ...given,
  };
}

/** A job half way through its chain: three stages done, one running, two booked, the last waiting. */
export function sampleJob(given: Partial<Job> = {}): Job {
  const start = Date.parse('2026-03-12T06:30:00.000Z');
  const stages = tailgateSheet.body.stages.filter((stage) => stage.option !== 'filler');
  let at = start;
  return {
    id: uuid(1, 6),
    number: 2418,
    version: 4,
    title: 'Tailgate, electric',
    vehicle: 'Estate, silver, KR 24 TB',
    colourNote: 'Three-stage pearl, spray-out card 12 fits best',
    notes: 'Owner wants the inner edge painted as well.',
    sheet: sheetOf,
    state: 'running',
    releaseAt: '2026-03-12T06:00:00.000Z',
    promiseAt: '2026-03-12T16:00:00.000Z',
    endsAt: null,
    late: false,
    weight: 3,
    electric: true,
    heatLimitCelsius: 60,
    heatLimitMinutes: 45,
    parts: [{ id: uuid(2, 1), name: 'Tailgate', substrate: 'steel', units: 2 }],
    stages: stages.map(({ kind, title, ways }, position): JobStage => {
      const way = ways[0];
      if (!way) throw new Error(`The sample stage ${title} has no way.`);
      const from = at + way.gap.min * minute;
      const iso = (ms: number) => new Date(ms).toISOString();
      let phaseAt = from;
      const phases = way.phases.map((phase) => {
        const begin = phaseAt;
        phaseAt += phase.minutes * minute;
        return { kind: phase.kind, from: iso(begin), to: iso(phaseAt) };
      });
      const state = position < 2 ? 'done' : position === 2 ? 'running' : 'waiting';
      const previousEnd = at;
      at = phaseAt;
      return {
        id: uuid(3, position),
        position,
        kind,
        title,
        state,
        startedAt: state === 'waiting' ? null : iso(from + 3 * minute),
        finishedAt: state === 'done' ? iso(phaseAt + 4 * minute) : null,
        ways,
        overruled: null,
        window: {
          earliest: position === 0 ? null : iso(previousEnd + way.gap.min * minute),
          latest: position === 0 || way.gap.max === null ? null : iso(previousEnd + way.gap.max * minute),
        },
        booking:
          position >= 6
            ? null
            : {
                id: uuid(4, position),
                way: way.id,
                wayLabel: way.label,
                placeId: uuid(5, 1),
                placeName: way.placeKinds[0] === 'booth' ? 'Booth 1' : 'Prep 2',
                personId: way.skill === null ? null : uuid(6, 1),
                personName: way.skill === null ? null : 'Imke Vonk',
                lampNames: [],
                from: iso(from),
                to: iso(phaseAt),
                phases,
                pinned: position === 4,
                state: state === 'waiting' ? 'planned' : state,
              },
      };
    }),
    history: [
      {
        at: '2026-03-12T07:20:00.000Z',
        by: 'Imke Vonk',
        kind: 'stage-started',
        detail: { stages: ['Prime'] },
      },
      {
        at: '2026-03-11T14:02:00.000Z',
        by: 'Rafe Moss',
        kind: 'job-changed',
        detail: {
          before: { promiseAt: '2026-03-13T16:00:00.000Z' },
          after: { promiseAt: '2026-03-12T16:00:00.000Z' },
        },
      },
      { at: '2026-03-10T09:11:00.000Z', by: null, kind: 'job-created', detail: {} },
    ],
    ...given,
  };
}
