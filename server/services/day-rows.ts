import type { DayRow } from '#contracts/day.ts';
import type { Resources } from '../db/resources.ts';
import { absencesOf, closuresOf, workingSpans } from '../planning/calendars.ts';
import type { Span } from '../planning/spans.ts';

const iso = <T extends Span>(span: T) => ({ ...span, from: span.from.toISOString(), to: span.to.toISOString() });

/** Rows of the day: booths, prep stations, racks, lamps, people. What is retired stays while `used` names it. */
export function dayRows(setUp: Resources, range: Span, used: ReadonlySet<string>, seesReasons: boolean): DayRow[] {
  const isShown = (resource: { id: string; retired: boolean }): boolean => !resource.retired || used.has(resource.id);
  const zones = new Map(setUp.zones.map((zone) => [zone.id, zone.name]));
  const kinds = ['booth', 'prep', 'rack'] as const;
  const places = kinds.flatMap((kind) => setUp.places.filter((place) => place.kind === kind));
  return [
    ...places.filter(isShown).map((place) => ({
      ...blank,
      id: place.id,
      kind: place.kind,
      name: place.name,
      units: place.units,
      zone: place.zoneId === null ? null : (zones.get(place.zoneId) ?? null),
      closed: closures(setUp, { placeId: place.id }, range),
    })),
    ...setUp.lamps.filter(isShown).map((lamp) => ({
      ...blank,
      id: lamp.id,
      kind: 'lamp' as const,
      name: lamp.name,
      kilowatts: lamp.kilowatts,
      circuitId: lamp.circuitId,
      closed: closures(setUp, { lampId: lamp.id }, range),
    })),
    ...setUp.people.filter(isShown).map((person) => ({
      ...blank,
      id: person.id,
      kind: 'person' as const,
      name: person.name,
      // Why somebody is away is between them and whoever plans.
      closed: absencesOf(setUp, person.id, range).map(({ from, to, reason }) =>
        iso({ from, to, kind: 'absence' as const, label: seesReasons ? reason : '' }),
      ),
      working: workingSpans(setUp, person.id, range).map(iso),
    })),
  ];
}

const blank = { units: null, zone: null, kilowatts: null, circuitId: null, working: null };

/** Its own closures, and those of the whole shop that stop places and lamps too. Holidays only send people home. */
function closures(setUp: Resources, of: { placeId: string } | { lampId: string }, range: Span): DayRow['closed'] {
  const whole = closuresOf(setUp, null, range).filter(({ kind }) => kind === 'maintenance' || kind === 'breakdown');
  return [...closuresOf(setUp, of, range), ...whole].map(iso);
}
