import rrule from 'rrule';
import type { Recurring } from '#server/db/resources.ts';
import { floatingOf, instantOf, readLocal, type Floating } from './local-time.ts';
import { remember } from './remember.ts';
import { clipSpan, type Span } from './spans.ts';

// CommonJS in Node: named imports fail outside of Vite.
const { RRule } = rrule;
const MINUTE = 60_000;
const DAY = 24 * 60 * MINUTE;

/**
 * Starts in floating time within `[from, to)`, in order.
 * @throws {RangeError} where the rule is not RFC 5545.
 */
export function localStarts(recurring: Recurring, zone: string, from: Floating, to: Floating): readonly Floating[] {
  const first = readLocal(recurring.startsLocal);
  if (recurring.rule === null) return first >= from && first < to ? [first] : [];
  const text = recurring.rule;
  // A rule is walked from its first day, years ago perhaps, and screens ask for the same days again and again.
  return rememberStarts(`${recurring.startsLocal} ${text} ${zone} ${from} ${to}`, () => {
    const rule = new RRule({ ...readRule(text, zone), dtstart: new Date(first) });
    return rule.between(new Date(from), new Date(to - 1), true).map((date) => date.getTime());
  });
}

const rememberStarts = remember<readonly Floating[]>(2_000);
const rememberSpan = remember<Span>(20_000);

function readRule(text: string, zone: string): Partial<rrule.Options> {
  try {
    const parsed = RRule.parseString(text.replace(/^RRULE:/i, ''));
    if (parsed.freq === undefined) throw new Error('FREQ is missing');
    return { ...parsed, tzid: null, until: untilOf(text, zone) };
  } catch (error) {
    throw new RangeError(`Not a recurrence rule: ${text}`, { cause: error });
  }
}

/** UNTIL may be an instant (with Z), a local time, or a bare day, which counts to its end. */
function untilOf(text: string, zone: string): Date | null {
  const match = /UNTIL=(\d{4})(\d\d)(\d\d)(?:T(\d\d)(\d\d)(\d\d)(Z?))?/i.exec(text);
  if (!match) return null;
  const [, year, month, day, hour, minute, second, utc] = match;
  const midnight = Date.UTC(Number(year), Number(month) - 1, Number(day));
  if (hour === undefined) return new Date(midnight + DAY - 1);
  const time = midnight + ((Number(hour) * 60 + Number(minute)) * 60 + Number(second)) * 1000;
  return new Date(utc ? floatingOf(new Date(time), zone) : time);
}

/**
 * What a rule means in `range`, as instants, clipped to it. Lengths are wall-clock lengths: the end is where the local
 * clock shows start + minutes, so a shift from 22:00 of 480 minutes ends at 06:00 and lasts 7 or 9 hours when the clocks
 * change in between.
 */
export function expand(recurring: Recurring, zone: string, range: Span): Span[] {
  return expandStarts(recurring, zone, range).flatMap(({ start }) => {
    const span = wallSpan(start, recurring.minutes, zone);
    return clipSpan(span, range) ?? [];
  });
}

/** The starts of everything that may reach into `range`. */
export function expandStarts(recurring: Recurring, zone: string, range: Span): { start: Floating }[] {
  // One day more on either side pays for every offset and clock change.
  const from = floatingOf(range.from, zone) - recurring.minutes * MINUTE - DAY;
  const to = floatingOf(range.to, zone) + DAY;
  return localStarts(recurring, zone, from, to).map((start) => ({ start }));
}

export function wallSpan(start: Floating, minutes: number, zone: string): Span {
  return rememberSpan(`${start} ${minutes} ${zone}`, () => ({
    from: instantOf(start, zone),
    to: instantOf(start + minutes * MINUTE, zone),
  }));
}
