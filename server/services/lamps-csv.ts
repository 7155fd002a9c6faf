import { v7 as uuid } from 'uuid';
import * as z from 'zod';
import type { CsvFault } from '#contracts/csv.ts';
import { lampFields, type LampFields } from '#contracts/lamps.ts';
import { thingName } from '#contracts/places.ts';
import { allOrNothing } from '../csv/all-or-nothing.ts';
import { csvNumber } from '../csv/fields.ts';
import { readRows } from '../csv/read-rows.ts';
import { writeRows } from '../csv/write-rows.ts';
import { recordChange } from '../db/changes.ts';
import { loadCircuits } from '../db/circuits.ts';
import { inShop } from '../db/in-shop.ts';
import { insertLamp, loadLamps, updateLamp } from '../db/lamps.ts';
import { findShopFrame } from '../db/people.ts';
import type { Deps } from '../deps.ts';
import { localDayOf } from '../planning/local-time.ts';
import type { Actor } from '../policies.ts';
import { differing } from './set-up-change.ts';

const row = z.object({
  name: thingName,
  circuit: thingName,
  kilowatts: csvNumber.pipe(lampFields.shape.kilowatts),
  wave: lampFields.shape.wave.default('short'),
});
type Row = z.output<typeof row>;

export function exportLamps(deps: Deps, actor: Actor): Promise<{ fileName: string; csv: string }> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const circuits = new Map((await loadCircuits(trx, shopId)).map(({ id, name }) => [id, name]));
    const lamps = (await loadLamps(trx, shopId)).filter(({ retired }) => !retired);
    const { timeZone } = await findShopFrame(trx, shopId);
    const rows = lamps.map((lamp) => ({ ...lamp, circuit: circuits.get(lamp.circuitId) ?? null }));
    const keys = Object.keys(row.shape) as (keyof Row)[];
    return { fileName: `lamps-${localDayOf(deps.now(), timeZone)}.csv`, csv: writeRows(keys, rows) };
  });
}

/** Lines are lamps by name; their circuits must be there already, since a circuit needs its limit. Nothing is taken away. */
export async function importLamps(deps: Deps, actor: Actor, input: { csv: string; tryOnly: boolean }) {
  const read = readRows(input.csv, row);
  const { shopId } = actor;
  return allOrNothing(deps.db, actor, { lines: read.lines, tryOnly: input.tryOnly }, async (trx) => {
    const there = new Map((await loadLamps(trx, shopId)).map((lamp) => [lamp.name.toLowerCase(), lamp]));
    const circuits = new Map((await loadCircuits(trx, shopId)).map(({ id, name }) => [name.toLowerCase(), id]));
    const faults: CsvFault[] = [...read.faults];
    const ids = { added: [] as string[], changed: [] as string[] };
    const seen = new Set<string>();
    for (const { line, value } of read.rows) {
      const { circuit, ...rest } = value;
      const key = value.name.toLowerCase();
      const before = there.get(key);
      const circuitId = circuits.get(circuit.toLowerCase());
      if (seen.has(key)) faults.push({ line, column: 'name', message: 'This name is in the file twice.' });
      else if (before?.retired)
        faults.push({ line, column: 'name', message: 'This lamp is retired; bring it back on the page first.' });
      else if (circuitId === undefined)
        faults.push({
          line,
          column: 'circuit',
          message: 'There is no circuit of this name; add it on the page first.',
        });
      else if (!before) {
        const id = uuid();
        await insertLamp(trx, shopId, id, { ...rest, circuitId });
        ids.added.push(id);
      } else {
        const changed = differing<LampFields>(before, { ...rest, circuitId });
        if (Object.keys(changed).length > 0) {
          await updateLamp(trx, shopId, before.id, changed);
          ids.changed.push(before.id);
        }
      }
      seen.add(key);
    }
    const all = [...ids.added, ...ids.changed];
    if (all.length > 0)
      await recordChange(trx, actor, { kind: 'shop-changed', ids: all, detail: { lampsImported: all.length } });
    return { added: ids.added.length, changed: ids.changed.length, faults };
  });
}
