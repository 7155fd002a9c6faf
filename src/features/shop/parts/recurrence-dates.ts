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

/** One time of it as instants: what the wall clock shows at the start and so many minutes later. */
function timesAt(floating: Date, minutes: number, zone: string): Times {
  const day = floating.toISOString().slice(0, 10);
  const minute = floating.getUTCHours() * 60 + floating.getUTCMinutes();
  const at = (after: number) => new Date(instantOf(day, minute + after, zone));
  return { from: at(0), to: at(minutes) };
}

/** All times that lie in the span or reach into it (instants in ms, the end is not part of it), in their order. */
export function timesBetween(recurring: Recurring, zone: string, from: number, to: number): Times[] {
  const { startsLocal, rule, minutes } = recurring;
  const starts =
    rule === null
      ? [new Date(`${startsLocal}:00Z`)]
      : floatingRule({ startsLocal, rule }, zone).between(
          // A day more on both sides: the wall clock may be changed in between.
          new Date(wallOf(from, zone) - (minutes + 1440) * MINUTE),
          new Date(wallOf(to, zone) + 1440 * MINUTE),
          true,
        );
  return starts
    .map((start) => timesAt(start, minutes, zone))
    .filter((times) => times.from.getTime() < to && times.to.getTime() > from);
}

/**
 * The next times that are not over at `now` (ms), at most `count`, as instants in the shop's zone. The hour on the wall
 * stays when the clocks change, and so does the hour at which it ends.
 */
export function nextTimes(recurring: Recurring, zone: string, now: number, count = 6): Times[] {
  const { startsLocal, rule, minutes } = recurring;
  const found: Times[] = [];
  const take = (floating: Date): boolean => {
    const times = timesAt(floating, minutes, zone);
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
