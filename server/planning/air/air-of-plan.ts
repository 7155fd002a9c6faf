import type { AirFigures } from '#contracts/air.ts';
import type { AirOfShop, PlanAir, ZoneAirFacts } from '#server/db/air.ts';
import { airAt, expectedHours, figuresOf, hourOf, HOURS } from './expected-air.ts';

/** A zone whose air is no longer what the plan was made with; the figures that differ most. */
export type ChangedAir = { zoneId: string; name: string; then: AirFigures; now: AirFigures };

export const airOfPlan = (air: AirOfShop, now: Date): PlanAir => ({
  zones: Object.fromEntries(
    air.zones.map((zone) => [
      zone.id,
      { hours: expectedHours(zone, air.settings, now), reading: freshReading(zone, air, now) },
    ]),
  ),
});

function freshReading({ latest }: ZoneAirFacts, { settings }: AirOfShop, now: Date): AirFigures | null {
  const isFresh = latest !== null && now.getTime() - latest.at.getTime() <= settings.freshMinutes * 60_000;
  return isFresh ? figuresOf(latest) : null;
}

/**
 * Zones in which what is expected, or what was read just now, differs from the plan's by more than the shop lets pass. A
 * reading is held against the reading of then, and where there was none against what was expected at this hour.
 */
export function changedAir(plan: PlanAir | null, air: AirOfShop, now: Date, timeZone: string): ChangedAir[] {
  return air.zones.flatMap((zone) => {
    const then = plan?.zones[zone.id];
    if (!then) return [];
    const hours = expectedHours(zone, air.settings, now);
    const reading = freshReading(zone, air, now);
    const pairs = [
      ...HOURS.map((hour) => ({ then: airAt(then.hours, hour), now: airAt(hours, hour) })),
      ...(reading ? [{ then: then.reading ?? airAt(then.hours, hourOf(now, timeZone)), now: reading }] : []),
    ];
    const worst = pairs.toSorted((a, b) => farApart(b, air) - farApart(a, air))[0];
    return worst && farApart(worst, air) > 1 ? [{ zoneId: zone.id, name: zone.name, ...worst }] : [];
  });
}

/** 1: just as far apart as the shop lets pass. */
const farApart = ({ then, now }: { then: AirFigures; now: AirFigures }, { settings }: AirOfShop): number =>
  Math.max(
    Math.abs(then.celsius - now.celsius) / settings.staleCelsius,
    Math.abs(then.humidity - now.humidity) / settings.staleHumidity,
  );
