import type { SprayAir } from '#contracts/bench.ts';
import type { Way } from '#contracts/sheets.ts';
import type { AirOfShop } from '#server/db/air.ts';
import { gateOf } from './gate.ts';

export const sprays = (way: Pick<Way, 'phases'> | null): boolean =>
  way?.phases.some(({ kind }) => kind === 'spray') ?? false;

/** What is known of the air where something is to be sprayed. */
export function sprayAir(air: AirOfShop, zoneId: string | null, now: Date): SprayAir {
  const zone = air.zones.find(({ id }) => id === zoneId);
  const latest = zone?.latest ?? null;
  return {
    zoneName: zone?.name ?? null,
    reading: latest && { at: latest.at.toISOString(), celsius: latest.celsius, humidity: latest.humidity },
    gate: latest && gateOf(latest, air.settings, now),
  };
}
