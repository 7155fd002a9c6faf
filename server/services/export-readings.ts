import { writeRows } from '../csv/write-rows.ts';
import { newestReadings } from '../db/air-readings.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';

const DAYS = 31;
/** As many lines as the import takes at once. */
const MOST_LINES = 5_000;

/** The readings of the last month as a file, the newest where there are more than a file takes. */
export function exportReadings(deps: Deps, actor: Actor): Promise<{ fileName: string; csv: string }> {
  return inShop(deps.db, actor, async (trx) => {
    const now = deps.now();
    const from = new Date(now.getTime() - DAYS * 86_400_000);
    const readings = await newestReadings(trx, actor.shopId, { from, most: MOST_LINES });
    const rows = readings.map(({ at, source: _source, ...rest }) => ({ ...rest, at: at.toISOString() }));
    const csv = writeRows(['zone', 'at', 'celsius', 'humidity', 'surfaceCelsius', 'id'], rows);
    return { fileName: `air-${now.toISOString().slice(0, 10)}.csv`, csv };
  });
}
