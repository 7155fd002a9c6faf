import type { Job, JobStage, JobState } from '#contracts/jobs.ts';
import type { HistoryLine, JobFacts } from '../db/jobs.ts';
import type { BookedStage, BookingFacts } from '../db/stages.ts';
import { windowOf } from '../planning/windows.ts';
import { bookedPhases, wayOf } from './booked-phases.ts';

const iso = (instant: Date | null): string | null => instant?.toISOString() ?? null;

/** Running: some work was begun. Planned: all that is left to do is booked. Otherwise it waits for the planner. */
export function jobStateOf(stored: JobFacts['state'], stages: readonly BookedStage[]): JobState {
  if (stored !== 'open') return stored;
  if (stages.some((stage) => stage.state !== 'waiting')) return 'running';
  return stages.every(isSettled) ? 'planned' : 'waiting';
}

const isSettled = (stage: BookedStage): boolean => stage.state === 'done' || stage.booking !== null;

/** When a stage ended, or ends by the posted plan; null while nobody knows. */
export const endOf = (stage: { finishedAt: Date | null; booking: { to: Date } | null }): Date | null =>
  stage.finishedAt ?? stage.booking?.to ?? null;

function jobEnd(job: JobFacts, stages: readonly BookedStage[]): Date | null {
  const last = stages.at(-1);
  if (job.state === 'withdrawn' || !last) return null;
  if (job.state === 'done') return job.finishedAt ?? endOf(last);
  return stages.every(isSettled) ? endOf(last) : null;
}

const bookingView = (booking: BookingFacts, ways: BookedStage['ways']): NonNullable<JobStage['booking']> => {
  const way = wayOf(ways, booking.way);
  const { from, to, phases: minutes, ...rest } = booking;
  return {
    ...rest,
    wayLabel: way.label,
    from: from.toISOString(),
    to: to.toISOString(),
    phases: bookedPhases(from, minutes, way).map((phase) => ({
      kind: phase.kind,
      from: phase.from.toISOString(),
      to: phase.to.toISOString(),
    })),
  };
};

function stageView(stage: BookedStage, previous: BookedStage | undefined): JobStage {
  const { booking, startedAt, finishedAt, ...rest } = stage;
  const window = windowOf(previous ? endOf(previous) : null, stage.ways, booking?.way);
  return {
    ...rest,
    startedAt: iso(startedAt),
    finishedAt: iso(finishedAt),
    window: { earliest: iso(window.earliest), latest: iso(window.latest) },
    booking: booking && bookingView(booking, stage.ways),
  };
}

/** A job as its page shows it. */
export function jobView(job: JobFacts, stages: BookedStage[], history: HistoryLine[], now: Date): Job {
  const { createdAt: _createdAt, finishedAt: _finishedAt, releaseAt, promiseAt, ...rest } = job;
  const endsAt = jobEnd(job, stages);
  return {
    ...rest,
    state: jobStateOf(job.state, stages),
    releaseAt: releaseAt.toISOString(),
    promiseAt: iso(promiseAt),
    endsAt: iso(endsAt),
    late: job.state !== 'withdrawn' && promiseAt !== null && (endsAt ?? now) > promiseAt,
    stages: stages.map((stage, i) => stageView(stage, stages[i - 1])),
    history: history.map((line) => ({ ...line, at: line.at.toISOString() })),
  };
}
