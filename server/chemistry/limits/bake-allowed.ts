import { HAIR } from '#chemistry/constants.ts';
import { positive, temperature, zeroOrMore } from '#chemistry/quantity.ts';
import type { HeatLimit, LimitSource } from './strictest-limit.ts';

export type WantedBake = {
  celsius: number;
  minutes: number;
  /** Minutes of heat this job has had already: the limit counts over repeated bakes. */
  earlierHeatMinutes: number;
};

export type BakeRefusal =
  | { code: 'above-heat-limit'; setBy: LimitSource; wantedCelsius: number; limitCelsius: number }
  | { code: 'beyond-heat-minutes'; setBy: LimitSource; wantedMinutes: number; minutesLeft: number };

/** Every limit that the bake would break; empty where it may go ahead. */
export function bakeRefusals(limit: HeatLimit, bake: WantedBake): BakeRefusal[] {
  const wantedCelsius = temperature('celsius', bake.celsius);
  const wantedMinutes = positive('minutes', bake.minutes);
  const earlier = zeroOrMore('earlierHeatMinutes', bake.earlierHeatMinutes);
  const refusals: BakeRefusal[] = [];
  if (limit.celsius !== null && wantedCelsius > limit.celsius.limit + HAIR) {
    const { setBy, limit: limitCelsius } = limit.celsius;
    refusals.push({ code: 'above-heat-limit', setBy, wantedCelsius, limitCelsius });
  }
  const minutesLeft = limit.minutes === null ? Infinity : Math.max(0, limit.minutes.limit - earlier);
  if (limit.minutes !== null && wantedMinutes > minutesLeft + HAIR) {
    refusals.push({ code: 'beyond-heat-minutes', setBy: limit.minutes.setBy, wantedMinutes, minutesLeft });
  }
  return refusals;
}
