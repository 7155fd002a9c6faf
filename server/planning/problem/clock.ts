import type { Interval, Minutes } from '#planner/types.ts';
import type { Span } from '../spans.ts';

const MINUTE = 60_000;

/**
 * Instants as whole minutes from the problem's origin. Rounding never gives away time that is not there: what is free
 * shrinks to whole minutes, what is taken or closed grows, a release waits, a promise comes due early.
 */
export type Clock = {
  origin: Date;
  down(instant: Date): Minutes;
  up(instant: Date): Minutes;
  instant(minute: Minutes): Date;
  /** Working and opening hours. */
  free(spans: readonly Span[]): Interval[];
  /** Closures. */
  taken(spans: readonly Span[]): Interval[];
};

export function clockFrom(origin: Date): Clock {
  const since = (instant: Date): number => (instant.getTime() - origin.getTime()) / MINUTE;
  const down = (instant: Date): Minutes => Math.max(0, Math.floor(since(instant)));
  const up = (instant: Date): Minutes => Math.max(0, Math.ceil(since(instant)));
  const filled = (list: Interval[]): Interval[] => list.filter(([from, to]) => to > from);
  return {
    origin,
    down,
    up,
    instant: (minute) => new Date(origin.getTime() + minute * MINUTE),
    free: (spans) => filled(spans.map((span): Interval => [up(span.from), down(span.to)])),
    taken: (spans) => filled(spans.map((span): Interval => [down(span.from), up(span.to)])),
  };
}
