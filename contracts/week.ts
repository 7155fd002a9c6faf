import { rulePartsOf, weekdays, type Recurring, type Weekday } from './recurrence.ts';

/** Break in minutes after the start of the shift. */
export type Break = { after: number; minutes: number };
export type ShiftHours = Recurring & { breaks: Break[] };

/** Working hours of one day in minutes since its midnight; a shift into the night ends after 1440. Breaks lie inside. */
export type DayHours = { from: number; to: number; breaks: { from: number; to: number }[] };
/** The usual case: the same hours week after week; null: a day off. */
export type Week = Record<Weekday, DayHours | null>;

export const emptyWeek = (): Week => ({ MO: null, TU: null, WE: null, TH: null, FR: null, SA: null, SU: null });

/** Shifts as a week; null where they are more than that: every second week, until a day, two on one day. */
export function weekOf(shifts: readonly ShiftHours[]): Week | null {
  const week = emptyWeek();
  for (const shift of shifts) {
    const parts = rulePartsOf(shift.rule ?? '');
    const days = parts.get('BYDAY')?.split(',') ?? [];
    const isPlain = [...parts.keys()].every((name) => ['FREQ', 'BYDAY', 'WKST'].includes(name));
    if (!isPlain || parts.get('FREQ') !== 'WEEKLY' || days.length === 0) return null;
    for (const day of days as Weekday[]) {
      if (week[day] !== null) return null;
      week[day] = dayHoursOf(shift);
    }
  }
  return week;
}

function dayHoursOf({ startsLocal, minutes, breaks }: ShiftHours): DayHours {
  const from = Number(startsLocal.slice(11, 13)) * 60 + Number(startsLocal.slice(14, 16));
  const rests = breaks.map((rest) => ({ from: from + rest.after, to: from + rest.after + rest.minutes }));
  return { from, to: from + minutes, breaks: rests };
}

/** A week as shifts that recur from `monday` (`2026-03-09`) on: one for all days of the same hours. */
export function shiftsOf(week: Week, monday: string): ShiftHours[] {
  const byHours = new Map<string, { hours: DayHours; days: Weekday[] }>();
  for (const day of weekdays) {
    const hours = week[day];
    if (!hours) continue;
    const key = JSON.stringify(hours);
    const same = byHours.get(key) ?? { hours, days: [] };
    same.days.push(day);
    byHours.set(key, same);
  }
  return [...byHours.values()].map(({ hours, days }) => ({
    startsLocal: `${monday}T${sayTime(hours.from)}`,
    rule: `FREQ=WEEKLY;BYDAY=${days.join(',')}`,
    minutes: hours.to - hours.from,
    breaks: hours.breaks.map((rest) => ({ after: rest.from - hours.from, minutes: rest.to - rest.from })),
  }));
}

/** `07:00`; past midnight by the clock of the next day. */
const sayTime = (minutes: number): string =>
  `${String(Math.floor(minutes / 60) % 24).padStart(2, '0')}:${String(minutes % 60).padStart(2, '0')}`;

const sayPiece = ({ from, to }: { from: number; to: number }): string => `${sayTime(from)}-${sayTime(to)}`;

/** `07:00-15:30 (09:30-09:45, 11:45-12:15)`; empty for a day off. `readDayHours` takes it back. */
export function sayDayHours(hours: DayHours | null): string {
  if (!hours) return '';
  const rests = hours.breaks.map(sayPiece).join(', ');
  return rests === '' ? sayPiece(hours) : `${sayPiece(hours)} (${rests})`;
}

export type DayHoursRead = { hours: DayHours | null } | { fault: string };

/** Hours typed loosely: `7-15:30`, `7:00 to 15:30 (9:30-9:45, 12-12:30)`, `8am-4pm`. Nothing, `off` or `-`: a day off. */
export function readDayHours(text: string): DayHoursRead {
  const plain = text.trim().toLowerCase();
  if (plain === '' || plain === '-' || plain === 'off') return { hours: null };
  const [, head = '', rests = ''] = /^([^(]*)(?:\(([^)]*)\))?$/.exec(plain) ?? [];
  const whole = readPiece(head, 0);
  if (!whole) return { fault: 'Write hours such as 7:00-15:30, with breaks behind them: 7:00-15:30 (9:30-9:45).' };
  const breaks = rests.split(/[,;]/).filter((rest) => rest.trim() !== '');
  const read = breaks.map((rest) => readPiece(rest, whole.from)).sort((a, b) => (a?.from ?? 0) - (b?.from ?? 0));
  let free = whole.from;
  for (const rest of read) {
    if (!rest) return { fault: 'Write breaks such as (9:30-9:45, 12:00-12:30).' };
    if (rest.from < free || rest.to > whole.to)
      return { fault: 'Breaks lie inside the hours and apart from each other.' };
    free = rest.to;
  }
  return { hours: { ...whole, breaks: read.flatMap((rest) => rest ?? []) } };
}

/** From and to; what would lie before `notBefore` is meant on the next day. */
function readPiece(text: string, notBefore: number): { from: number; to: number } | null {
  const [first = '', second = '', ...more] = text.split(/\s*(?:-|–|—|\bto\b)\s*/);
  const [from, to] = [readTime(first.trim()), readTime(second.trim())];
  if (from === null || to === null || more.length > 0) return null;
  const start = from < notBefore ? from + 1440 : from;
  const end = to + Math.floor(start / 1440) * 1440;
  return { from: start, to: end > start ? end : end + 1440 };
}

function readTime(text: string): number | null {
  const match = /^(\d{1,2})(?:[:.h]?(\d{2}))?\s*([ap])?\.?m?\.?$/.exec(text);
  if (!match) return null;
  const [, hours, minutes = '0', half] = match;
  const typed = Number(hours);
  if (Number(minutes) > 59 || typed > 24 || (half !== undefined && (typed < 1 || typed > 12))) return null;
  const hour = half === undefined ? typed % 24 : (typed % 12) + (half === 'p' ? 12 : 0);
  return hour * 60 + Number(minutes);
}
