import type { Way } from '#contracts/sheets.ts';
import type { OpenStage } from '#server/db/open-jobs.ts';
import type { AirBook, Airy, AirTime } from './air-book.ts';
import type { Ambient } from './minutes-in-air.ts';

type PhaseOf = Way['phases'][number];

/** Which coating dries in a stage: its own, or the one that was put on last before it. */
export function coatingOf(stages: readonly Pick<OpenStage, 'id' | 'coatingId'>[], stageId: string): string | null {
  const upTo = stages.slice(0, stages.findIndex(({ id }) => id === stageId) + 1);
  return upTo.findLast(({ coatingId }) => coatingId !== null)?.coatingId ?? null;
}

/** What of a phase depends on the air; null: nothing. */
function ambientOf(way: Way, phase: PhaseOf): Ambient | null {
  if (phase.source === 'air') return 'air';
  if (phase.kind !== 'flash') return null;
  const driesThrough = !way.phases.some(({ kind }) => kind === 'spray' || kind === 'bake') && way.bakeCelsius === null;
  return driesThrough ? 'air' : 'flash';
}

const timeOf = (way: Way, phase: PhaseOf, coatingId: string | null): AirTime | null => {
  const ambient = ambientOf(way, phase);
  return ambient && { minutes: phase.minutes, ambient, coatingId };
};

/** Minutes of each phase in the air of these places, the most of them. */
export const phaseMinutes = (way: Way, coatingId: string | null, places: readonly Airy[], air: AirBook): number[] =>
  way.phases.map((phase) => {
    const time = timeOf(way, phase, coatingId);
    return time ? air.minutesAt(time, places) : phase.minutes;
  });

/**
 * A way as it was booked keeps the flashes it was given, for the air of its day; only what is shorter than any air allows
 * is asked for anew.
 */
export const bookedMinutes = (
  way: Way,
  coatingId: string | null,
  booked: readonly (readonly [number, number])[],
  air: AirBook,
): number[] | null =>
  booked.length !== way.phases.length
    ? null
    : way.phases.map((phase, k) => {
        const time = timeOf(way, phase, coatingId);
        const given = (booked[k]?.[1] ?? 0) - (booked[k]?.[0] ?? 0);
        return time ? Math.max(given, air.least(time)) : phase.minutes;
      });

/** A gap that is a flash of the coat before it: by its source, or because the stage before it sprays. */
export const isFlash = (way: Way, before: Pick<OpenStage, 'ways'> | undefined): boolean =>
  way.gap.min > 0 &&
  (way.gap.source !== undefined ||
    (before?.ways.some(({ phases }) => phases.some(({ kind }) => kind === 'spray')) ?? false));

/** The gap in this air: its least stretches, with what of it holds the place; its end, a recoat window, never does. */
export function airedGap(way: Way, coatingId: string | null, places: readonly Airy[], air: AirBook): Way['gap'] {
  const least = (minutes: number): number => air.minutesAt({ minutes, ambient: 'flash', coatingId }, places);
  const min = least(way.gap.min);
  return { ...way.gap, min, settle: Math.min(min, least(way.gap.settle)) };
}
