import type { ReplyOf } from '#contracts/endpoint.ts';
import type { readHours as contract } from '#contracts/hours.ts';
import { inShop } from '../db/in-shop.ts';
import { loadClosures, loadOpenings, readHoursVersion } from '../db/hours.ts';
import { loadLamps } from '../db/lamps.ts';
import { findShopFrame } from '../db/people.ts';
import { loadPlaces } from '../db/places.ts';
import type { Deps } from '../deps.ts';
import { localDayOf } from '../planning/local-time.ts';
import { openingWeek } from '../planning/opening-week.ts';
import type { Actor } from '../policies.ts';

const named = ({ id, name, retired }: { id: string; name: string; retired: boolean }) => ({ id, name, retired });

/** Opening hours and closures of the shop as they hold today and later. */
export function readHours(deps: Deps, actor: Actor): Promise<ReplyOf<typeof contract>> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const version = await readHoursVersion(trx, shopId);
    const { timeZone } = await findShopFrame(trx, shopId);
    const openings = await loadOpenings(trx, shopId);
    return {
      version,
      timeZone,
      ...openingWeek(openings, localDayOf(deps.now(), timeZone)),
      closures: await loadClosures(trx, shopId),
      places: (await loadPlaces(trx, shopId)).map(named),
      lamps: (await loadLamps(trx, shopId)).map(named),
    };
  });
}
