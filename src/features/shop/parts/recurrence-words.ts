import { RRule } from 'rrule';
import type { Recurring, Weekday } from '#contracts/recurrence.ts';
import { formatDay, formatDuration, formatMinute } from '#src/lib/formats.ts';
import { formOf, minuteOf, type RecurrenceForm } from './recurrence.ts';

export const weekdayWord: Record<Weekday, string> = {
  MO: 'Monday',
  TU: 'Tuesday',
  WE: 'Wednesday',
  TH: 'Thursday',
  FR: 'Friday',
  SA: 'Saturday',
  SU: 'Sunday',
};
export const rankWord: Record<RecurrenceForm['rank'], string> = {
  '1': 'first',
  '2': 'second',
  '3': 'third',
  '4': 'fourth',
  '-1': 'last',
};

/** `1st`, `2nd`, `23rd`, `11th`. */
export function ordinal(number: number): string {
  const teen = number % 100 >= 11 && number % 100 <= 13;
  const ending = teen ? 'th' : (['th', 'st', 'nd', 'rd'][number % 10] ?? 'th');
  return `${number}${ending}`;
}

const listed = (words: readonly string[]): string =>
  words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;

const month = (day: string): string => formatDay(day, 'long').split(' ')[2] ?? '';
const dated = (day: string): string => `${formatDay(day)} ${day.slice(0, 4)}`;

/** A recurrence in words: `every 2 weeks on Friday at 7:00 for 2 h, until Thu 31 Dec 2026`. */
export function sayRecurrence(recurring: Recurring, clock: '24' | '12'): string {
  const form = formOf(recurring);
  return `${days(form)}${hours(recurring, clock)}${stop(form)}`;
}

/** Only on which days: `Monday to Friday`, `on the first Monday of the month, 10 times`. */
export function sayDays(recurring: Recurring): string {
  const form = formOf(recurring);
  return `${days(form)}${stop(form)}`;
}

function hours({ startsLocal, minutes }: Recurring, clock: '24' | '12'): string {
  const from = minuteOf(startsLocal);
  if (from === 0 && minutes % 1440 === 0) return minutes === 1440 ? ', all day' : ` for ${formatDuration(minutes)}`;
  return ` at ${formatMinute(from, clock)} for ${formatDuration(minutes)}`;
}

function days(form: RecurrenceForm): string {
  const every = Number(form.every);
  switch (form.repeat) {
    case 'once':
      return `once, ${dated(form.day)}`;
    case 'daily':
      return every === 1 ? 'every day' : `every ${every} days`;
    case 'weekly':
      return weekly(form, every);
    case 'monthly':
      return monthly(form, every);
    case 'yearly':
      return `${every === 1 ? 'every year' : `every ${every} years`} on ${yearDay(form)}`;
    case 'own':
      return otherRule(form.rule);
    default:
      return form.repeat satisfies never;
  }
}

const workdays = 'MO,TU,WE,TH,FR';
function weekly({ weekdays }: RecurrenceForm, every: number): string {
  const chosen = (Object.keys(weekdayWord) as Weekday[]).filter((day) => weekdays.includes(day));
  if (every === 1 && chosen.join() === workdays) return 'Monday to Friday';
  if (every === 1 && chosen.length === 7) return 'every day';
  const words = listed(chosen.map((day) => weekdayWord[day]));
  return every === 1 ? `every ${words}` : `every ${every} weeks on ${words}`;
}

function monthly(form: RecurrenceForm, every: number): string {
  const day = form.monthBy === 'day' ? ordinal(Number(form.day.slice(8, 10))) : ranked(form);
  return every === 1 ? `on the ${day} of the month` : `every ${every} months on the ${day}`;
}

const ranked = ({ monthBy, rank, rankDay }: RecurrenceForm): string =>
  monthBy === 'last-day' ? 'last day' : `${rankWord[rank]} ${weekdayWord[rankDay]}`;

function yearDay(form: RecurrenceForm): string {
  return form.monthBy === 'day'
    ? `${Number(form.day.slice(8, 10))} ${month(form.day)}`
    : `the ${ranked(form)} of ${month(form.day)}`;
}

function stop({ repeat, stops, until, count }: RecurrenceForm): string {
  if (repeat === 'once' || repeat === 'own' || stops === 'never') return '';
  if (stops === 'on') return `, until ${dated(until)}`;
  return Number(count) === 1 ? ', one time' : `, ${count} times`;
}

/** What the fields cannot say: in the library's words where it can say all of it, else the rule as it stands. */
function otherRule(rule: string): string {
  try {
    const read = RRule.fromString(rule.replace(/^RRULE:/i, ''));
    // It takes BYSETPOS for said without saying it.
    if (read.isFullyConvertibleToText() && !/BYSETPOS/i.test(rule)) return read.toText();
  } catch {
    // Said as it stands; what is wrong with it is told beside its field.
  }
  return `by the rule ${rule}`;
}
