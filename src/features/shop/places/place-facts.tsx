import type { Place, Zone } from '#contracts/places.ts';
import { useFormats } from '#src/lib/session.ts';

/** A place in a line: what it is and holds. */
export function PlaceFacts({ place, zones }: { place: Place; zones: readonly Zone[] }) {
  const { temperature } = useFormats();
  const zone = zones.find(({ id }) => id === place.zoneId);
  const facts = [
    place.name,
    `${place.units} ${place.units === 1 ? 'unit' : 'units'}`,
    zone ? `zone ${zone.name}` : 'air of its own',
    place.bakes
      ? `bakes${place.bakeLimitCelsius === null ? '' : ` to ${temperature(place.bakeLimitCelsius, 'limit')}`}`
      : 'does not bake',
    place.volumeM3 === null ? 'volume unknown' : `${place.volumeM3} m³`,
    place.airFlowM3PerHour === null ? 'air flow unknown' : `${place.airFlowM3PerHour} m³/h`,
  ];
  return <p>Now it says: {facts.join(', ')}.</p>;
}
