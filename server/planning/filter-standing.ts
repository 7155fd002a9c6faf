import type { FilterFields, FilterStanding } from '#contracts/upkeep.ts';
import { localDayOf } from './local-time.ts';

const DAY = 86_400_000;
/** The pace of the last four weeks says when the hours will be used up. */
export const PACE_DAYS = 28;
/** Common practice: order and plan a change a week ahead, and look twice at nine tenths of the pressure. */
const SOON_DAYS = 7;
const SOON_SHARE = 0.9;

type Limits = Pick<FilterFields, 'changeAfterHours' | 'changeAfterDays' | 'pascalLimit'>;
export type FilterFacts = {
  changedAt: Date | null;
  minutesSinceChange: number;
  minutesInPace: number;
  /** The last reading since the last change. */
  reading: { pascals: number; at: Date } | null;
};

type Verdict = { state: 'good' | 'soon' | 'due'; because: FilterStanding['because'] };

/**
 * How a filter stands. Whichever limit is reached first makes it due; `soon` is within a week at the present pace, or at
 * nine tenths of the pressure. A pressure over its limit counts whatever the calendar says.
 */
export function filterStanding(limits: Limits, facts: FilterFacts, now: Date, zone: string): FilterStanding {
  const sprayHours = facts.minutesSinceChange / 60;
  const hoursPerDay = facts.minutesInPace / 60 / PACE_DAYS;
  // Without a change on record nobody knows what it has been through.
  const byHours = facts.changedAt === null ? null : dueByHours(limits, sprayHours, hoursPerDay, now);
  const byDays =
    limits.changeAfterDays === null || facts.changedAt === null
      ? null
      : new Date(facts.changedAt.getTime() + limits.changeAfterDays * DAY);
  const due = [byHours, byDays].flatMap((at) => at ?? []).sort((a, b) => a.getTime() - b.getTime())[0];
  const verdict = judge(limits, facts, { byHours, byDays }, now);
  return {
    state: facts.changedAt === null && verdict.state === 'good' ? 'never-changed' : verdict.state,
    because: verdict.because,
    changedAt: facts.changedAt?.toISOString() ?? null,
    sprayHours: tenths(sprayHours),
    hoursPerDay: tenths(hoursPerDay),
    dueOn: due ? localDayOf(due, zone) : null,
    pascals: facts.reading?.pascals ?? null,
    measuredAt: facts.reading?.at.toISOString() ?? null,
  };
}

const tenths = (number: number): number => Math.round(number * 10) / 10;

/** When the hours will be used up: now where they are, never where nobody sprays. */
function dueByHours({ changeAfterHours }: Limits, hours: number, perDay: number, now: Date): Date | null {
  if (changeAfterHours === null) return null;
  const left = changeAfterHours - hours;
  if (left <= 0) return now;
  return perDay === 0 ? null : new Date(now.getTime() + (left / perDay) * DAY);
}

function judge(
  { pascalLimit }: Limits,
  { reading }: FilterFacts,
  { byHours, byDays }: { byHours: Date | null; byDays: Date | null },
  now: Date,
): Verdict {
  const pressure = pascalLimit === null || reading === null ? 0 : reading.pascals / pascalLimit;
  const within = (at: Date | null, days: number) => at !== null && at.getTime() <= now.getTime() + days * DAY;
  if (pressure >= 1) return { state: 'due', because: 'pressure' };
  if (within(byHours, 0)) return { state: 'due', because: 'hours' };
  if (within(byDays, 0)) return { state: 'due', because: 'days' };
  if (pressure >= SOON_SHARE) return { state: 'soon', because: 'pressure' };
  if (within(byHours, SOON_DAYS)) return { state: 'soon', because: 'hours' };
  if (within(byDays, SOON_DAYS)) return { state: 'soon', because: 'days' };
  return { state: 'good', because: null };
}
