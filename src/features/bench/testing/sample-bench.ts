import type { BenchStage, BenchView } from '#contracts/bench.ts';
import type { PhaseKind } from '#contracts/common.ts';

const minute = 60_000;

type Given = Partial<BenchStage> & { start?: string; plan?: [PhaseKind, number][] };

/** A stage on 12 March 2026. `start` is UTC (`08:30`), `plan` its phases in minutes. */
export function sampleStage(n: number, { start = '08:30', plan = [['work', 60]], ...given }: Given = {}): BenchStage {
  let at = Date.parse(`2026-03-12T${start}:00.000Z`);
  const from = new Date(at).toISOString();
  const phases = plan.map(([kind, minutes]) => {
    const begin = new Date(at).toISOString();
    at += minutes * minute;
    return { kind, from: begin, to: new Date(at).toISOString() };
  });
  return {
    id: `01958000-0003-7000-8000-${String(n).padStart(12, '0')}`,
    version: 1,
    jobId: '01958000-0001-7000-8000-000000000006',
    jobNumber: 2412 + n,
    jobTitle: 'Tailgate, electric',
    vehicle: 'Estate, silver, KR 24 TB',
    partNames: 'Tailgate',
    colourNote: '',
    kind: 'prep',
    title: 'Block-sand and mask',
    wayLabel: 'By hand',
    placeName: 'Prep 2',
    lampNames: [],
    from,
    to: new Date(at).toISOString(),
    phases,
    window: { earliest: null, latest: null },
    state: 'waiting',
    startedAt: null,
    finishedAt: null,
    ready: true,
    sharedWith: [],
    air: null,
    ...given,
  };
}

/** Half past nine: one stage runs in its second flash, one is next, two come later, one is done. */
export const sampleBench = (given: Partial<BenchView> = {}): BenchView => ({
  serverTime: '2026-03-12T08:31:20.000Z',
  day: '2026-03-12',
  person: { id: '01958000-0006-7000-8000-000000000001', name: 'Imke Vonk' },
  working: [
    { from: '2026-03-12T06:30:00.000Z', to: '2026-03-12T11:00:00.000Z' },
    { from: '2026-03-12T11:30:00.000Z', to: '2026-03-12T15:00:00.000Z' },
  ],
  stages: [
    sampleStage(1, {
      start: '06:30',
      plan: [['work', 50]],
      state: 'done',
      title: 'Clean and feather',
      startedAt: '2026-03-12T06:33:00.000Z',
      finishedAt: '2026-03-12T07:21:00.000Z',
    }),
    sampleStage(6, {
      start: '07:55',
      plan: [
        ['setup', 10],
        ['spray', 10],
        ['flash', 15],
        ['spray', 10],
        ['flash', 15],
        ['spray', 10],
      ],
      state: 'running',
      startedAt: '2026-03-12T07:57:00.000Z',
      title: 'Base and clear',
      kind: 'colour',
      wayLabel: 'Three coats, two clear',
      placeName: 'Booth 1',
      colourNote: 'Three-stage pearl, spray-out card 12 fits best. Blend into the left quarter.',
      window: { earliest: '2026-03-12T07:30:00.000Z', latest: '2026-03-12T12:00:00.000Z' },
      sharedWith: ['Mirror caps'],
    }),
    sampleStage(11, {
      start: '09:20',
      title: 'Prime',
      kind: 'prime',
      wayLabel: 'Two coats',
      placeName: 'Booth 1',
      jobTitle: 'Door shell, left',
      partNames: 'Door shell',
      plan: [
        ['setup', 10],
        ['spray', 10],
        ['flash', 10],
        ['spray', 10],
      ],
      window: { earliest: '2026-03-12T08:40:00.000Z', latest: '2026-03-12T09:32:00.000Z' },
    }),
    sampleStage(12, {
      start: '12:00',
      title: 'Cure primer',
      kind: 'cure',
      wayLabel: 'Cure lamp',
      lampNames: ['Lamp A'],
      jobTitle: 'Door shell, left',
      plan: [
        ['bake', 25],
        ['cool', 20],
      ],
      ready: false,
      window: { earliest: '2026-03-12T10:15:00.000Z', latest: '2026-03-12T14:00:00.000Z' },
    }),
    sampleStage(13, { start: '13:10', jobTitle: 'Hood', ready: false, plan: [['work', 70]] }),
  ],
  ...given,
});
