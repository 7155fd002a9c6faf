import { RRule } from 'rrule';
import type { Recurring } from '#contracts/recurrence.ts';
import { instantOf, wallOf } from '#src/lib/wall-clock.ts';

export type Times = { from: Date; to: Date };
const MINUTE = 60_000;

/** UNTIL as a rule of floating time reads it: an instant as the shop's clock shows it, a bare day to its end. */
function untilOf(rule: string, zone: string): Date | null {
  const match = /UNTIL=(\d{4})(\d\d)(\d\d)(?:T(\d\d)(\d\d)(\d\d)(Z?))?/i.exec(rule);
  if (!match) return null;
  const [, year, month, day, hour = '23', minute = '59', second = '59', utc] = match;
  const at = Date.UTC(Number(year), Number(month) - 1, Number(day), Number(hour), Number(minute), Number(second));
  return new Date(utc ? wallOf(at, zone) : at);
}

/** The rule in floating time: what the wall clock shows, counted as if it were UTC. @throws where it is no rule. */
export const floatingRule = ({ startsLocal, rule }: { startsLocal: string; rule: string }, zone: string): RRule =>
  new RRule({
    ...RRule.parseString(rule.replace(/^RRULE:/i, '')),
    tzid: null,
    until: untilOf(rule, zone),
    dtstart: new Date(`${startsLocal}:00Z`),
  });

/**
 * The next times that are not over at `now` (ms), at most `count`, as instants in the shop's zone. The hour on the wall
 * stays when the clocks change, and so does the hour at which it ends.
 */
export function nextTimes(recurring: Recurring, zone: string, now: number, count = 6): Times[] {
  const { startsLocal, rule, minutes } = recurring;
  const found: Times[] = [];
  const take = (floating: Date): boolean => {
    const local = floating.toISOString();
    const minute = floating.getUTCHours() * 60 + floating.getUTCMinutes();
    const at = (after: number) => new Date(instantOf(local.slice(0, 10), minute + after, zone));
    const times = { from: at(0), to: at(minutes) };
    if (times.to.getTime() > now) found.push(times);
    return found.length < count;
  };
  if (rule === null) take(new Date(`${startsLocal}:00Z`));
  // Walked from a day before now, so that years of past dates are not turned into instants.
  else {
    const dates = floatingRule({ startsLocal, rule }, zone);
    let at = dates.after(new Date(wallOf(now, zone) - (minutes + 1440) * MINUTE), true);
    while (at !== null && take(at)) at = dates.after(at);
  }
  return found;
}
