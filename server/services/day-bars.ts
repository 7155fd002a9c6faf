import type { Bar } from '#contracts/day.ts';
import type { DayStage } from '../db/day.ts';
import type { Span } from '../planning/spans.ts';
import { heldTo, windowOf } from '../planning/windows.ts';
import { bookedPhases } from './booked-phases.ts';

type Booked = DayStage & { booked: NonNullable<DayStage['booked']>; way: NonNullable<DayStage['way']> };
type Names = { person: (id: string) => string | null };

const isBooked = (stage: DayStage | undefined): stage is Booked =>
  stage !== undefined && stage.booked !== null && stage.way !== null;

/** The bars that touch a range: booked there, or holding a place there. `stages` are whole jobs in order. */
export function barsOf(stages: DayStage[], range: Span, shown: 'posted' | 'draft', names: Names): Bar[] {
  const jobs = new Map<string, DayStage[]>();
  for (const stage of stages) jobs.set(stage.jobId, [...(jobs.get(stage.jobId) ?? []), stage]);
  return [...jobs.values()].flatMap((job) => {
    const late = isLate(job);
    return job.flatMap((stage, i) => {
      if (!isBooked(stage)) return [];
      const held = heldTo(stage.booked.to, following(job[i + 1]));
      if (stage.booked.from >= range.to || held <= range.from) return [];
      return barOf(stage, { held, late, shown, names, previous: job[i - 1], chain: chainFrom(job, i) });
    });
  });
}

/** Whether the job's last stage ends, by this plan or by what happened, after the promise. */
function isLate(job: DayStage[]): boolean {
  const last = job.at(-1);
  const end = last?.finishedAt ?? last?.booked?.to ?? null;
  return end !== null && last?.promiseAt != null && end > last.promiseAt;
}

const following = (next: DayStage | undefined) => (isBooked(next) ? { way: next.way, from: next.booked.from } : null);

/** The stages right after this one that are done where it leaves the part. */
function chainFrom(job: DayStage[], at: number): string[] {
  const after = job.slice(at + 1);
  const end = after.findIndex((stage) => stage.way?.stay !== true);
  return after.slice(0, end === -1 ? after.length : end).map((stage) => stage.id);
}

type Around = {
  held: Date;
  late: boolean;
  shown: 'posted' | 'draft';
  names: Names;
  previous: DayStage | undefined;
  chain: string[];
};

function barOf(stage: Booked, around: Around): Bar {
  const { booked, way } = stage;
  const window = windowOf(around.previous?.finishedAt ?? around.previous?.booked?.to ?? null, [way], way.id);
  const phases = bookedPhases(booked.from, booked.phases, way);
  return {
    id: stage.id,
    jobId: stage.jobId,
    jobNumber: stage.jobNumber,
    jobTitle: stage.jobTitle,
    partNames: stage.partNames,
    kind: stage.kind,
    title: stage.title,
    way: way.id,
    wayLabel: way.label,
    placeId: booked.placeId,
    personId: booked.personId,
    personName: booked.personId === null ? null : around.names.person(booked.personId),
    needsHands: phases.some((phase) => phase.attendance === 'hands'),
    lampIds: booked.lampIds,
    loadId: booked.loadId,
    from: booked.from.toISOString(),
    to: booked.to.toISOString(),
    heldTo: around.held.toISOString(),
    phases: phases.map((phase) => ({ ...phase, from: phase.from.toISOString(), to: phase.to.toISOString() })),
    window: { earliest: window.earliest?.toISOString() ?? null, latest: window.latest?.toISOString() ?? null },
    pinned: booked.pinned,
    state: stage.state === 'waiting' ? 'planned' : stage.state,
    late: around.late,
    promiseAt: stage.promiseAt?.toISOString() ?? null,
    chain: around.chain,
    posted: around.shown === 'draft' ? movedFrom(stage) : null,
    added: around.shown === 'draft' && stage.posted === null,
  };
}

/** Where the posted plan has it, if that is elsewhere, with somebody else or at another time. */
function movedFrom({ booked, posted }: Booked): Bar['posted'] {
  if (posted === null) return null;
  const same =
    posted.placeId === booked.placeId &&
    posted.personId === booked.personId &&
    posted.from.getTime() === booked.from.getTime();
  return same ? null : { ...posted, from: posted.from.toISOString() };
}
