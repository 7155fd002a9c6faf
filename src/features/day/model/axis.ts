import { instantOf } from '#src/lib/wall-clock.ts';
import { dayMs, minuteMs, wallMs } from './wall-time.ts';

/** The drawn time: the same clock hours of each day, side by side. Minutes count from the day's midnight. */
export type Axis = { zone: string; days: readonly string[]; fromMinute: number; toMinute: number };

const dayMinutes = 1440;

/** Where an instant (ms) lies on the axis, 0 to 1; an instant in hidden hours lies on the seam. */
export function fractionAt(axis: Axis, at: number): number {
  const first = Date.parse(`${axis.days[0] ?? '1970-01-01'}T00:00:00Z`);
  const wall = wallMs(axis.zone, at) - first;
  const day = Math.floor(wall / dayMs);
  if (day < 0) return 0;
  if (day >= axis.days.length) return 1;
  const shown = axis.toMinute - axis.fromMinute;
  const minute = (wall - day * dayMs) / minuteMs - axis.fromMinute;
  return (day * shown + Math.min(Math.max(minute, 0), shown)) / (axis.days.length * shown);
}

/** The instant (ms) at a place of the axis, 0 to 1, rounded to `step` minutes of the clock; beyond the ends the end. */
export function instantAt(axis: Axis, fraction: number, step: number): number {
  const shown = axis.toMinute - axis.fromMinute;
  const minutes = Math.round(Math.min(Math.max(fraction, 0), 1) * axis.days.length * shown);
  const day = Math.min(axis.days.length - 1, Math.floor(minutes / shown));
  const minute = axis.fromMinute + Math.round((minutes - day * shown) / step) * step;
  return instantOf(axis.days[day] ?? '1970-01-01', minute, axis.zone);
}

type Stretch = { from: number; to: number };

/**
 * The clock hours worth showing: from the hour in which the first thing of any day begins to the hour in which the last
 * one ends, with half an hour of air. What runs through a midnight does not stretch them. Their number is a multiple of
 * `multiple` hours (a divisor of 24), so that hour labels fall on the same clock times every day.
 */
export function hoursWorthShowing(
  zone: string,
  busy: readonly Stretch[],
  multiple = 1,
): { fromMinute: number; toMinute: number } {
  let first = Infinity;
  let last = -Infinity;
  for (const { from, to } of busy) {
    const start = wallMs(zone, from);
    const end = wallMs(zone, to);
    first = Math.min(first, minuteOf(start));
    last = Math.max(last, minuteOf(start));
    if (Math.floor(start / dayMs) === Math.floor((end - 1) / dayMs)) last = Math.max(last, minuteOf(end - 1) + 1);
  }
  if (first === Infinity) [first, last] = [8 * 60, 17 * 60];
  const fromMinute = Math.max(0, Math.floor((first - 30) / 60) * 60);
  const toMinute = Math.min(dayMinutes, Math.max(Math.ceil((last + 30) / 60) * 60, fromMinute + 240));
  return stretched(fromMinute, toMinute, multiple * 60);
}

function stretched(fromMinute: number, toMinute: number, unit: number): { fromMinute: number; toMinute: number } {
  const length = Math.ceil((toMinute - fromMinute) / unit) * unit;
  const end = Math.min(dayMinutes, fromMinute + length);
  return { fromMinute: end - length, toMinute: end };
}

const minuteOf = (wall: number) => Math.floor((((wall % dayMs) + dayMs) % dayMs) / minuteMs);
