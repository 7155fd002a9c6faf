import { QuantityError } from '#chemistry/quantity.ts';

/** A day of the calendar without a clock or a zone: `2026-01-10`. */
export type CalendarDay = string;

export type DayParts = { year: number; month: number; day: number };

/** @throws QuantityError where the text is no day that exists, such as 2023-02-29 */
export function parseDay(quantity: string, text: CalendarDay): DayParts {
  const match = /^(\d{4})-(\d{2})-(\d{2})$/.exec(text);
  const [year = NaN, month = NaN, day = NaN] = match?.slice(1).map(Number) ?? [];
  if (!(year >= 1 && month >= 1 && month <= 12 && day >= 1 && day <= daysInMonth(year, month))) {
    throw new QuantityError(quantity, text, 'a day that exists, as YYYY-MM-DD');
  }
  return { year, month, day };
}

export function formatDay({ year, month, day }: DayParts): CalendarDay {
  return `${String(year).padStart(4, '0')}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`;
}

export function daysInMonth(year: number, month: number): number {
  const leap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
  if (month === 2) return leap ? 29 : 28;
  return [4, 6, 9, 11].includes(month) ? 30 : 31;
}

/** Whole days from one day to another; negative where `to` comes first. UTC has no summer time to trip over. */
export function daysBetween(from: DayParts, to: DayParts): number {
  const utc = ({ year, month, day }: DayParts) => Date.UTC(year, month - 1, day);
  return Math.round((utc(to) - utc(from)) / 86_400_000);
}
