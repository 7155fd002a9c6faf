import { ruleFault, rulePartsOf, weekdays, type Recurring, type Weekday } from '#contracts/recurrence.ts';
import { addDays, daysFromTo } from '#src/lib/calendar-days.ts';
import { formatDuration, formatMinute } from '#src/lib/formats.ts';
import { parseLooseTime } from '#src/lib/loose-time.ts';
import { parseLooseDuration } from './loose-duration.ts';

export const repeats = ['once', 'daily', 'weekly', 'monthly', 'yearly', 'own'] as const;
export type Repeat = (typeof repeats)[number];
/** `first` to `fourth` and `last` weekday of a month, as RFC 5545 numbers them. */
export const ranks = ['1', '2', '3', '4', '-1'] as const;

/** A recurrence as it is typed. All of it is text, so that half a date is kept as it stands. */
export type RecurrenceForm = {
  /** First day, `2026-03-13`, and its time as typed: `7`, `7:30`, `2 pm`. */
  day: string;
  time: string;
  /** From midnight for whole days; `time`, `length` and `end` are not asked then, `days` is. */
  allDay: boolean;
  days: string;
  /** `2 h`, `90`, `1:30`. */
  length: string;
  /** When it ends: by the clock, and, where it happens once, the day. */
  end: string;
  endDay: string;
  repeat: Repeat;
  every: string;
  weekdays: Weekday[];
  /** Monthly and yearly: the day's number as that of the first day, or a weekday by its rank. */
  monthBy: 'day' | 'last-day' | 'weekday';
  rank: (typeof ranks)[number];
  rankDay: Weekday;
  stops: 'never' | 'on' | 'after';
  until: string;
  count: string;
  /** The rule itself, for what the other fields cannot say; its first day of the week is kept too. */
  rule: string;
  wkst: Weekday | null;
};

/** Whether a length is asked for (`for 2 h`) or an end (`until 9:00`). */
export type Measure = 'length' | 'end';
export type RecurrenceFaults = Partial<Record<keyof RecurrenceForm, string>>;

const DAY = 1440;
export const weekdayOf = (day: string): Weekday => weekdays[(new Date(`${day}T12:00:00Z`).getUTCDay() + 6) % 7] ?? 'MO';
export const isDay = (text: string): boolean => /^\d{4}-\d\d-\d\d$/.test(text) && !Number.isNaN(Date.parse(text));
export const minuteOf = (local: string): number => Number(local.slice(11, 13)) * 60 + Number(local.slice(14, 16));

/** What is asked at first: on `day` at 7:00 for an hour, once. */
export const newRecurrence = (day: string, more: Partial<RecurrenceForm> = {}): RecurrenceForm => ({
  day,
  time: '7:00',
  allDay: false,
  days: '1',
  length: '1 h',
  end: '8:00',
  endDay: day,
  repeat: 'once',
  every: '1',
  weekdays: [weekdayOf(day)],
  monthBy: 'day',
  rank: rankOf(day),
  rankDay: weekdayOf(day),
  stops: 'never',
  until: '',
  count: '10',
  rule: '',
  wkst: null,
  ...more,
});

/** The fifth counts as the last: a month without one would be left out. */
export function rankOf(day: string): (typeof ranks)[number] {
  const nth = Math.ceil(Number(day.slice(8, 10)) / 7);
  return ranks[nth - 1] ?? '-1';
}

/** A rule as fields; what they cannot say stays a rule. */
export function formOf(recurring: Recurring, clock: '24' | '12' = '24'): RecurrenceForm {
  const day = recurring.startsLocal.slice(0, 10);
  const from = minuteOf(recurring.startsLocal);
  const to = from + recurring.minutes;
  const allDay = from === 0 && recurring.minutes % DAY === 0;
  return {
    ...newRecurrence(day),
    time: formatMinute(from, clock),
    allDay,
    days: allDay ? String(recurring.minutes / DAY) : '1',
    length: formatDuration(recurring.minutes),
    end: formatMinute(to % DAY, clock),
    endDay: addDays(day, Math.floor(to / DAY)),
    ...(recurring.rule === null ? {} : ruleFields(recurring.rule, day)),
  };
}

const frequencies: Readonly<Record<string, Repeat>> = {
  DAILY: 'daily',
  WEEKLY: 'weekly',
  MONTHLY: 'monthly',
  YEARLY: 'yearly',
};

function ruleFields(rule: string, day: string): Partial<RecurrenceForm> {
  const own = { repeat: 'own' as const, rule };
  if (ruleFault(rule) !== null) return own;
  const parts = rulePartsOf(rule);
  const repeat = frequencies[parts.get('FREQ') ?? ''];
  const on = repeat && onFields(repeat, parts, day);
  if (!repeat || !on) return own;
  const until = parts.get('UNTIL');
  const count = parts.get('COUNT');
  // An instant would have to be read in a zone, and a time before the day's last start leaves that day out.
  if (until !== undefined && !/^\d{8}(T235959)?$/.test(until)) return own;
  return {
    ...on,
    repeat,
    rule,
    every: parts.get('INTERVAL') ?? '1',
    wkst: (parts.get('WKST') ?? null) as Weekday | null,
    ...(until === undefined
      ? {}
      : { stops: 'on', until: `${until.slice(0, 4)}-${until.slice(4, 6)}-${until.slice(6, 8)}` }),
    ...(count === undefined ? {} : { stops: 'after', count }),
  };
}

/** On which days, as fields; null where they cannot say it. */
function onFields(repeat: Repeat, parts: Map<string, string>, day: string): Partial<RecurrenceForm> | null {
  const has = (...names: string[]) => names.some((name) => parts.has(name));
  const byDay = parts.get('BYDAY');
  switch (repeat) {
    case 'daily':
      return has('BYDAY', 'BYMONTHDAY', 'BYMONTH') ? null : {};
    case 'weekly':
      if (has('BYMONTH', 'BYSETPOS')) return null;
      return byDay === undefined ? { weekdays: [weekdayOf(day)] } : { weekdays: byDay.split(',') as Weekday[] };
    case 'yearly':
      // "On 2 May" is the first day itself; only that month may be named.
      if (has('BYMONTH') ? parts.get('BYMONTH') !== String(Number(day.slice(5, 7))) : has('BYDAY', 'BYMONTHDAY'))
        return null;
      return monthFields(parts, day);
    case 'monthly':
      return has('BYMONTH') ? null : monthFields(parts, day);
    default:
      return null;
  }
}

function monthFields(parts: Map<string, string>, day: string): Partial<RecurrenceForm> | null {
  const [byDay, byMonthDay, position] = ['BYDAY', 'BYMONTHDAY', 'BYSETPOS'].map((name) => parts.get(name));
  if (byDay === undefined && position === undefined) {
    if (byMonthDay === '-1') return { monthBy: 'last-day' };
    return byMonthDay === undefined || byMonthDay === String(Number(day.slice(8, 10))) ? { monthBy: 'day' } : null;
  }
  const ranked = /^\+?(-?\d+)?(MO|TU|WE|TH|FR|SA|SU)$/.exec(byDay ?? '');
  if (!ranked || byMonthDay !== undefined || (ranked[1] !== undefined && position !== undefined)) return null;
  const rank = ranks.find((one) => one === (ranked[1] ?? position?.replace('+', '')));
  return rank ? { monthBy: 'weekday', rank, rankDay: ranked[2] as Weekday } : null;
}

export type RecurrenceRead = { value: Recurring; faults: null } | { value: null; faults: RecurrenceFaults };

/** What was typed as a start, a rule and a length, or what is wrong with which field. */
export function readRecurrence(form: RecurrenceForm, measure: Measure): RecurrenceRead {
  const faults: RecurrenceFaults = {};
  if (!isDay(form.day)) faults.day = 'Choose a day.';
  const from = form.allDay ? 0 : parseLooseTime(form.time);
  if (from === null) faults.time = 'Enter a time, such as 7 or 7:30.';
  const minutes = minutesOf(form, measure, from, faults);
  const rule = ruleOf(form, faults);
  if (Object.keys(faults).length > 0 || from === null || minutes === null) return { value: null, faults };
  const time = `${String(Math.floor(from / 60)).padStart(2, '0')}:${String(from % 60).padStart(2, '0')}`;
  return { value: { startsLocal: `${form.day}T${time}`, rule, minutes }, faults: null };
}

function minutesOf(
  form: RecurrenceForm,
  measure: Measure,
  from: number | null,
  faults: RecurrenceFaults,
): number | null {
  if (form.allDay) {
    const days = wholeOf(form.days, 365);
    if (days === null) faults.days = 'Enter a number of days from 1 to 365.';
    return days === null ? null : days * DAY;
  }
  if (measure === 'length') {
    const minutes = parseLooseDuration(form.length);
    if (minutes === null || minutes < 1) faults.length = 'Enter a length, such as 2 h, 90 min or 3 days.';
    return minutes;
  }
  const end = parseLooseTime(form.end);
  if (end === null) faults.end = 'Enter a time, such as 17 or 17:30.';
  if (end === null || from === null) return null;
  // Again and again: an end at or before the start is that of the next day.
  if (form.repeat !== 'once') return end > from ? end - from : end - from + DAY;
  if (!isDay(form.endDay) || !isDay(form.day)) {
    faults.endDay = 'Choose a day.';
    return null;
  }
  const minutes = (daysFromTo(form.day, form.endDay) - 1) * DAY + end - from;
  if (minutes < 1) faults.end = 'It ends before it begins.';
  return minutes < 1 ? null : minutes;
}

const wholeOf = (text: string, max: number): number | null => {
  const number = /^\d{1,4}$/.test(text.trim()) ? Number(text) : 0;
  return number >= 1 && number <= max ? number : null;
};

function ruleOf(form: RecurrenceForm, faults: RecurrenceFaults): string | null {
  if (form.repeat === 'once') return null;
  if (form.repeat === 'own') {
    const fault = ruleFault(form.rule.trim());
    if (fault !== null) faults.rule = `${fault.charAt(0).toUpperCase()}${fault.slice(1)}.`;
    return form.rule.trim().replace(/^RRULE:/i, '');
  }
  const every = wholeOf(form.every, 999);
  if (every === null) faults.every = 'Enter a whole number from 1.';
  const parts = [
    `FREQ=${form.repeat.toUpperCase()}`,
    ...(every !== null && every > 1 ? [`INTERVAL=${every}`] : []),
    ...onParts(form, faults),
    ...stopParts(form, faults),
    ...(form.wkst === null ? [] : [`WKST=${form.wkst}`]),
  ];
  return parts.join(';');
}

function onParts(form: RecurrenceForm, faults: RecurrenceFaults): string[] {
  if (form.repeat === 'weekly') {
    if (form.weekdays.length === 0) faults.weekdays = 'Choose at least one day.';
    return [`BYDAY=${weekdays.filter((day) => form.weekdays.includes(day)).join(',')}`];
  }
  if (form.repeat !== 'monthly' && form.repeat !== 'yearly') return [];
  const month = form.repeat === 'yearly' ? [`BYMONTH=${Number(form.day.slice(5, 7))}`] : [];
  switch (form.monthBy) {
    case 'day':
      return [...month, `BYMONTHDAY=${Number(form.day.slice(8, 10))}`];
    case 'last-day':
      return [...month, 'BYMONTHDAY=-1'];
    case 'weekday':
      return [...month, `BYDAY=${form.rank}${form.rankDay}`];
    default:
      return form.monthBy satisfies never;
  }
}

function stopParts(form: RecurrenceForm, faults: RecurrenceFaults): string[] {
  switch (form.stops) {
    case 'never':
      return [];
    case 'after': {
      const count = wholeOf(form.count, 9999);
      if (count === null) faults.count = 'Enter how many times, from 1.';
      return [`COUNT=${count}`];
    }
    case 'on':
      if (!isDay(form.until)) faults.until = 'Choose the last day.';
      else if (form.until < form.day) faults.until = 'The last day lies before the first.';
      // A start in local time takes a local UNTIL (RFC 5545, 3.3.10); the whole of that day belongs to it.
      return [`UNTIL=${form.until.replaceAll('-', '')}T235959`];
    default:
      return form.stops satisfies never;
  }
}
