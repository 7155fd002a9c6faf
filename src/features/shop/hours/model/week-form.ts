import type { WeekSpan } from '#contracts/hours.ts';
import { weekdays, type Weekday } from '#contracts/recurrence.ts';
import { formatMinute } from '#src/lib/formats.ts';
import { parseLooseTime } from '#src/lib/loose-time.ts';

/** Hours of each day as typed: `7:00-18:00`, `7-12, 13-18`; nothing where the shop is closed. */
export type WeekForm = Record<Weekday, string>;

const DAY = 1440;

export const sayDay = (week: readonly WeekSpan[], day: Weekday, clock: '24' | '12'): string =>
  week
    .filter((span) => span.day === day)
    .map(({ from, to }) => `${formatMinute(from, clock)}-${formatMinute(to % DAY, clock)}`)
    .join(', ');

export const weekForm = (week: readonly WeekSpan[], clock: '24' | '12'): WeekForm =>
  Object.fromEntries(weekdays.map((day) => [day, sayDay(week, day, clock)])) as WeekForm;

type DayRead = { spans: { from: number; to: number }[] } | { fault: string };

/** Hours of one day; an end at or before its start is that of the next day, `0` or `24` is midnight. */
export function readDay(text: string): DayRead {
  const plain = text.trim();
  if (plain === '' || /^(closed|off|-)$/i.test(plain)) return { spans: [] };
  const spans: { from: number; to: number }[] = [];
  for (const piece of plain.split(/[,;]| and /)) {
    const [first = '', second = '', ...more] = piece.split(/\s*(?:-|–|—|\bto\b)\s*/);
    const from = parseLooseTime(first);
    const to = /^\s*24(:00)?\s*$/.test(second) ? DAY : parseLooseTime(second);
    if (from === null || to === null || more.length > 0)
      return { fault: 'Write hours such as 7:00-18:00, or 7-12, 13-18.' };
    spans.push({ from, to: to > from ? to : to + DAY });
  }
  spans.sort((a, b) => a.from - b.from);
  const meets = spans.some((span, i) => i > 0 && span.from < (spans[i - 1]?.to ?? 0));
  return meets ? { fault: 'These hours meet each other.' } : { spans };
}

export type WeekRead = { week: WeekSpan[]; faults: null } | { week: null; faults: Partial<WeekForm> };

export function readWeek(form: WeekForm): WeekRead {
  const faults: Partial<WeekForm> = {};
  const week = weekdays.flatMap((day) => {
    const read = readDay(form[day]);
    if ('spans' in read) return read.spans.map((span) => ({ day, ...span }));
    faults[day] = read.fault;
    return [];
  });
  return Object.keys(faults).length > 0 ? { week: null, faults } : { week, faults: null };
}
