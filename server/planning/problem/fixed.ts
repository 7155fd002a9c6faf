import type { Way } from '#contracts/sheets.ts';
import type { Assignment, Interval, Mode, Phase } from '#planner/types.ts';
import type { Booked } from '#server/db/bookings.ts';
import type { OpenJob, OpenStage } from '#server/db/open-jobs.ts';
import type { Clock } from './clock.ts';
import type { Roster } from './roster.ts';
import { unitsOf } from './units.ts';

/** A place of no shop: where something was done that nobody had booked. */
export const ELSEWHERE = 'elsewhere';

/** A stage that stands as it is: who and where as booked, times as they are or have to be expected. */
export type Standing = { job: OpenJob; stage: OpenStage; booked: Booked | null; assignment: Assignment };

type Frame = { clock: Clock; roster: Roster; now: Date };

/** A booking as the planner writes it; minutes of its phases count from its start. */
export function toAssignment(booked: Booked, { clock, roster }: Omit<Frame, 'now'>): Assignment {
  const start = clock.down(booked.from);
  const phases = booked.phases.map(([from, to]): Interval => [start + from, start + to]);
  return {
    stage: booked.stageId,
    mode: booked.way,
    place: booked.placeId,
    person: booked.personId === null ? null : roster.idAt(booked.personId, booked.from),
    lamps: [...booked.lampIds].sort(),
    load: booked.loadId,
    start,
    end: phases.at(-1)?.[1] ?? start,
    phases,
  };
}

/**
 * A stage that has begun: done from start to finish as it happened; running from when it was started, as long as planned,
 * and at least until now. One that nobody had booked happened elsewhere.
 */
export function begunStage(job: OpenJob, stage: OpenStage, booked: Booked | null, frame: Frame): Standing {
  const { clock, now } = frame;
  const began = stage.startedAt ?? now;
  const start = clock.down(began);
  const planned: readonly (readonly [number, number])[] = booked?.phases.length ? booked.phases : [[0, 0]];
  const length = planned.at(-1)?.[1] ?? 0;
  const end = stage.finishedAt ? Math.max(start, clock.up(stage.finishedAt)) : Math.max(start + length, clock.up(now));
  const phases = planned.map(([from, to], i): Interval => [
    Math.min(start + from, end),
    i === planned.length - 1 ? end : Math.min(start + to, end),
  ]);
  const assignment = booked
    ? { ...toAssignment(booked, frame), start, end, phases }
    : { stage: stage.id, mode: stage.ways[0]?.id ?? ELSEWHERE, place: ELSEWHERE, person: null, lamps: [], load: null };
  return { job, stage, booked, assignment: { ...assignment, start, end, phases } };
}

/** The one mode of a stage that stands: its way, with as many phases as it was booked with. */
export function standingMode({ job, stage, booked, assignment: at }: Standing): Mode {
  const way: Way | undefined = stage.ways.find((candidate) => candidate.id === at.mode);
  const known = way !== undefined && way.phases.length === at.phases.length;
  const phases: Phase[] = known
    ? way.phases.map(({ kind, minutes, attendance, lamp }) => ({ kind, minutes, attendance, lamp: lamp === true }))
    : at.phases.map(([from, to]) => ({ kind: 'work', minutes: to - from, attendance: 'none' }));
  const lit = phases.some((phase) => phase.lamp === true);
  return {
    id: at.mode,
    places: [at.place],
    stay: booked !== null && way?.stay === true,
    people: at.person === null ? [] : [at.person],
    lamps: at.lamps,
    lampCount: lit ? Math.max(1, at.lamps.length) : at.lamps.length,
    units: unitsOf(job),
    family: way?.family ?? null,
    load: way?.load ?? null,
    gap: way?.gap ?? { min: 0, max: null, settle: 0 },
    split: way?.split ?? false,
    phases,
  };
}
