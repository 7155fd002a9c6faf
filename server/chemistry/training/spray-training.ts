import { daysBetween, daysInMonth, formatDay, parseDay, type CalendarDay } from './calendar-day.ts';

/** Painters who spray need a refresher at least every five years (40 CFR 63.11173(g), subpart HHHHHH). */
export const TRAINING_YEARS = 5;
export const TRAINING_WARNING_DAYS = 90;

/**
 * The last day on which a training is good, that day included: the same date five years on. Trained 2021-01-10: through
 * 2026-01-10. The rule does not speak of leap days; trained 2020-02-29 is taken through 2025-02-28, the last day of that
 * February, since going on to 1 March would stretch five years by a day.
 */
export function trainingGoodThrough(trained: CalendarDay): CalendarDay {
  const { year, month, day } = parseDay('trained', trained);
  const lastYear = year + TRAINING_YEARS;
  return formatDay({ year: lastYear, month, day: Math.min(day, daysInMonth(lastYear, month)) });
}

export type TrainingStanding =
  | { code: 'good'; goodThrough: CalendarDay; daysLeft: number }
  /** 90 days or fewer are left: time to book the refresher. */
  | { code: 'ends-soon'; goodThrough: CalendarDay; daysLeft: number }
  | { code: 'lapsed'; goodThrough: CalendarDay; daysOver: number }
  | { code: 'not-yet'; trained: CalendarDay }
  | { code: 'never-trained' };

/**
 * May this person spray on that day? Primers and sealers count as spraying, sanding does not. `good` and `ends-soon` may; the
 * others are given no spray stage unless the shop turns that to a warning.
 */
export function trainingStanding(trained: CalendarDay | null, on: CalendarDay): TrainingStanding {
  if (trained === null) return { code: 'never-trained' };
  const today = parseDay('on', on);
  if (daysBetween(parseDay('trained', trained), today) < 0) return { code: 'not-yet', trained };
  const goodThrough = trainingGoodThrough(trained);
  const daysLeft = daysBetween(today, parseDay('goodThrough', goodThrough));
  if (daysLeft < 0) return { code: 'lapsed', goodThrough, daysOver: -daysLeft };
  return { code: daysLeft <= TRAINING_WARNING_DAYS ? 'ends-soon' : 'good', goodThrough, daysLeft };
}
