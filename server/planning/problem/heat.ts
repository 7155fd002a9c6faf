import { bakeRefusals } from '#chemistry/limits/bake-allowed.ts';
import { BOOTH_AIR_LIMITS_CELSIUS, UNRECORDED_BATTERY_LIMIT } from '#chemistry/limits/heat-sources.ts';
import { strictestLimit, type HeatLimit, type VehicleHeat } from '#chemistry/limits/strictest-limit.ts';
import { purgeBeforeHeat } from '#chemistry/purge/purge-minutes.ts';
import type { Way } from '#contracts/sheets.ts';
import type { OpenJob } from '#server/db/open-jobs.ts';
import type { PlaceSetUp } from '#server/db/resources.ts';
import type { WayRefusal } from './refusals.ts';

/** Booth air that bakes, as opposed to a lamp in front of the panel. */
export const heatsBooth = (way: Way): boolean =>
  way.bakeCelsius !== null && way.phases.some((phase) => phase.kind === 'bake' && phase.lamp !== true);
export const usesLamps = (way: Way): boolean => way.phases.some((phase) => phase.lamp === true);

const heated = (phase: Way['phases'][number]): boolean => phase.kind === 'bake' || phase.lamp === true;

/** Minutes of heat that a way gives the part: by its sheet, or as it was booked. */
export function heatMinutes(way: Way, booked?: readonly (readonly [number, number])[]): number {
  if (way.bakeCelsius === null) return 0;
  return way.phases.reduce((sum, phase, i) => {
    if (!heated(phase)) return sum;
    const span = booked?.[i];
    return sum + (span ? span[1] - span[0] : phase.minutes);
  }, 0);
}

/** What the vehicle and the parts of a job stand. A battery without a recorded limit: 49 C and 45 min in all. */
export function heatLimitOf(job: OpenJob): HeatLimit {
  const recorded = job.heatLimitCelsius !== null || job.heatLimitMinutes !== null;
  const vehicle: VehicleHeat =
    job.electric || recorded
      ? {
          battery: true,
          batteryOut: false,
          recorded: {
            celsius: job.heatLimitCelsius ?? (job.electric ? UNRECORDED_BATTERY_LIMIT.celsius : 200),
            minutes: job.heatLimitMinutes ?? (job.electric ? UNRECORDED_BATTERY_LIMIT.minutes : null),
          },
        }
      : { battery: false };
  const substrates = [...new Set(job.parts.map((part) => part.substrate))];
  return strictestLimit({ substrates, vehicle, booth: null, coatingCelsius: null });
}

/** The way's temperature against the limit; how long it lasts is a matter of all stages together: `heat-budget.ts`. */
export function tooHot(way: Way, limit: HeatLimit): WayRefusal | null {
  // No limit can be held against heat of an unknown temperature, so it is never offered.
  if (way.bakeCelsius === null) return way.phases.some(heated) ? { code: 'heat-unknown', figures: [] } : null;
  if (heatMinutes(way) === 0) return null;
  const bake = { celsius: way.bakeCelsius, minutes: heatMinutes(way), earlierHeatMinutes: 0 };
  const [refusal] = bakeRefusals({ ...limit, minutes: null }, bake);
  if (refusal?.code !== 'above-heat-limit') return null;
  return { code: 'heat-limit', figures: [refusal.wantedCelsius, refusal.limitCelsius] };
}

/** Whole minutes of purge before heat may go on in a place; null where its volume or air flow is not known. */
export function purgeOf(place: PlaceSetUp): number | null {
  const purge = purgeBeforeHeat({ cubicMetres: place.volumeM3, cubicMetresPerHour: place.airFlowM3PerHour });
  return purge.heat === 'after-purge' ? purge.wholeMinutes : null;
}

/** Why the heat of a way may not be had in a place; null where it may. Lamps outside of booths ask no purge of a place. */
export function heatRefusedAt(way: Way, place: PlaceSetUp): WayRefusal | null {
  const booth = heatsBooth(way);
  if (booth) {
    const most = place.bakeLimitCelsius ?? BOOTH_AIR_LIMITS_CELSIUS.us;
    if (!place.bakes || (way.bakeCelsius ?? 0) > most) return { code: 'booth-heat', figures: [way.bakeCelsius ?? 0] };
  }
  const asksPurge = booth || (usesLamps(way) && place.kind === 'booth');
  return asksPurge && purgeOf(place) === null ? { code: 'purge-unknown', figures: [] } : null;
}
