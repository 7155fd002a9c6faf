import { zeroOrMore } from '#chemistry/quantity.ts';
import { wholeMinutesUp } from '#chemistry/rounding.ts';
import type { Purge } from './purge-minutes.ts';

export type SprayPlaceKind = 'booth' | 'open-workshop';

/**
 * Until its clearance time has been measured (HSE, UK, motor vehicle repair pages: booths 1 to 5 min, an open workshop 30):
 * the longest of the range.
 */
export const UNMEASURED_CLEARANCE_MINUTES: Record<SprayPlaceKind, number> = { booth: 5, 'open-workshop': 30 };

export type PeopleGate = {
  wholeMinutes: number;
  setBy: 'purge' | 'measured-clearance' | 'unmeasured-clearance';
};

/**
 * Minutes after spraying before anyone enters without air-fed breathing equipment: the purge or the clearance, whichever is
 * longer. Without a known purge the clearance alone decides. Not the same as the gate for heat, which only asks the purge.
 */
export function peopleGate(place: SprayPlaceKind, purge: Purge, measuredClearanceMinutes: number | null): PeopleGate {
  const measured = measuredClearanceMinutes !== null;
  const clearance = zeroOrMore('clearanceMinutes', measuredClearanceMinutes ?? UNMEASURED_CLEARANCE_MINUTES[place]);
  if (purge.heat === 'after-purge' && purge.minutes > clearance) {
    return { wholeMinutes: wholeMinutesUp(purge.minutes), setBy: 'purge' };
  }
  return { wholeMinutes: wholeMinutesUp(clearance), setBy: measured ? 'measured-clearance' : 'unmeasured-clearance' };
}
