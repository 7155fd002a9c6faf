import { purgeBeforeHeat } from '#chemistry/purge/purge-minutes.ts';
import type { Place } from '#contracts/places.ts';
import type { PlaceRow } from '../db/places.ts';

/** A place with the purge that its volume and air flow ask for. */
export function placeView(row: PlaceRow): Place {
  const purge = purgeBeforeHeat({ cubicMetres: row.volumeM3, cubicMetresPerHour: row.airFlowM3PerHour });
  return {
    ...row,
    purge:
      purge.heat === 'after-purge' ? { minutes: purge.minutes, refused: null } : { minutes: null, refused: purge.code },
  };
}
