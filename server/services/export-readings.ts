import { writeRows } from '../csv/write-rows.ts';
import { readingsOfSpan } from '../db/air-readings.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { readRange } from './read-range.ts';

const MOST_DAYS = 31;
/** As many lines as the import takes at once. */
const MOST_LINES = 5_000;

/** @throws {Refusal} bad-request for a span that is none, too long or holds more than a file takes. */
export function exportReadings(
  deps: Deps,
  actor: Actor,
  asked: { from: string; to: string },
): Promise<{ fileName: string; csv: string }> {
  const span = readRange(asked, MOST_DAYS);
  return inShop(deps.db, actor, async (trx) => {
    const readings = await readingsOfSpan(trx, actor.shopId, { ...span, most: MOST_LINES + 1 });
    if (readings.length > MOST_LINES)
      throw new Refusal('bad-request', {
        fields: [{ path: 'query.to', message: `the span holds more than ${MOST_LINES} readings: take a shorter one` }],
      });
    const rows = readings.map(({ at, source: _source, ...rest }) => ({ ...rest, at: at.toISOString() }));
    const csv = writeRows(['zone', 'at', 'celsius', 'humidity', 'surfaceCelsius', 'id'], rows);
    return { fileName: `air-${asked.from.slice(0, 10)}.csv`, csv };
  });
}
