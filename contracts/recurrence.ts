import * as z from 'zod';

/** The clock on the shop's wall, `2026-03-13T07:00`: no zone, so that a rule keeps its hour when the clocks change. */
export const localTime = z
  .string()
  .regex(
    /^\d{4}-(0[1-9]|1[0-2])-(0[1-9]|[12]\d|3[01])T([01]\d|2[0-3]):[0-5]\d$/,
    'must be a local time such as 2026-03-13T07:00',
  )
  .refine((text) => isDay(text.slice(0, 10)), 'there is no such day');

const isDay = (day: string): boolean => {
  const at = new Date(`${day}T00:00:00Z`);
  return !Number.isNaN(at.getTime()) && at.toISOString().startsWith(day);
};

export const weekdays = ['MO', 'TU', 'WE', 'TH', 'FR', 'SA', 'SU'] as const;
export type Weekday = (typeof weekdays)[number];

const list = (one: string): RegExp => new RegExp(`^${one}(,${one})*$`);
/** What may stand in a rule (RFC 5545, 3.3.10). Nothing recurs more often than daily, and the hour is that of the start. */
const parts: Readonly<Record<string, RegExp>> = {
  FREQ: /^(DAILY|WEEKLY|MONTHLY|YEARLY)$/,
  INTERVAL: /^[1-9]\d{0,2}$/,
  COUNT: /^[1-9]\d{0,4}$/,
  UNTIL: /^\d{8}(T\d{6}Z?)?$/,
  BYDAY: list('([+-]?([1-9]|[1-4]\\d|5[0-3]))?(MO|TU|WE|TH|FR|SA|SU)'),
  BYMONTHDAY: list('[+-]?([1-9]|[12]\\d|3[01])'),
  BYMONTH: list('([1-9]|1[0-2])'),
  BYSETPOS: list('[+-]?[1-9]\\d{0,2}'),
  WKST: /^(MO|TU|WE|TH|FR|SA|SU)$/,
};

/** The parts of a rule by name. Says nothing about whether they are right. */
export const rulePartsOf = (rule: string): Map<string, string> =>
  new Map(
    rule
      .replace(/^RRULE:/i, '')
      .toUpperCase()
      .split(';')
      .map((part): [string, string] => {
        const at = part.indexOf('=');
        return at < 0 ? [part, ''] : [part.slice(0, at), part.slice(at + 1)];
      }),
  );

const longestMonth = [31, 29, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];

/** What is wrong with a recurrence rule, null where it is one that can be kept. */
export function ruleFault(rule: string): string | null {
  const given = rulePartsOf(rule);
  for (const [name, value] of given) {
    const pattern = parts[name];
    if (!pattern) return `${name.slice(0, 20)} is no part that is known here`;
    if (!pattern.test(value)) return `${name} cannot be ${value.slice(0, 40) || 'empty'}`;
  }
  const frequency = given.get('FREQ');
  if (frequency === undefined) return 'FREQ is missing';
  if (given.has('COUNT') && given.has('UNTIL')) return 'COUNT and UNTIL exclude each other';
  const ranked = /\d/.test(given.get('BYDAY') ?? '');
  if (ranked && (frequency === 'DAILY' || frequency === 'WEEKLY'))
    return `BYDAY of a ${frequency} rule takes no number`;
  if (given.has('BYMONTHDAY') && frequency === 'WEEKLY') return 'BYMONTHDAY is not for WEEKLY';
  if (given.has('BYSETPOS') && (frequency === 'DAILY' || !(given.has('BYDAY') || given.has('BYMONTHDAY'))))
    return 'BYSETPOS needs BYDAY or BYMONTHDAY to choose from, and more than a day';
  return neverComes(given) ? 'there is never such a day' : null;
}

/** 30 February and its like, which would be looked for until the end of all years. */
function neverComes(given: Map<string, string>): boolean {
  const days = given
    .get('BYMONTHDAY')
    ?.split(',')
    .map((day) => Math.abs(Number(day)));
  const months = given.get('BYMONTH')?.split(',').map(Number);
  if (!days || !months) return false;
  return !months.some((month) => days.some((day) => day <= (longestMonth[month - 1] ?? 0)));
}

/** An RFC 5545 recurrence rule without DTSTART, which is the local start beside it. */
export const recurrenceRule = z
  .string()
  .trim()
  .max(300)
  .superRefine((rule, context) => {
    const fault = ruleFault(rule);
    if (fault !== null) context.addIssue({ code: 'custom', message: fault });
  });

/**
 * Something that happens once (`rule` null) or again and again. `minutes` is its length on the wall clock: from 22:00 for
 * 480 ends at 6:00, also in the night in which the clocks change.
 */
export const recurring = z.strictObject({
  startsLocal: localTime,
  rule: recurrenceRule.nullable(),
  minutes: z.number().int().min(1).max(525_600),
});
export type Recurring = z.output<typeof recurring>;
