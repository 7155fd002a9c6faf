import { v7 as uuid } from 'uuid';
import * as z from 'zod';
import type { CsvFault } from '#contracts/csv.ts';
import { closureKind, type Closure, type ClosureFields } from '#contracts/hours.ts';
import { localTime, recurrenceRule } from '#contracts/recurrence.ts';
import { allOrNothing } from '../csv/all-or-nothing.ts';
import { csvNumber } from '../csv/fields.ts';
import { readRows } from '../csv/read-rows.ts';
import { writeRows } from '../csv/write-rows.ts';
import { recordChange } from '../db/changes.ts';
import { insertClosure, loadClosures } from '../db/hours.ts';
import { inShop } from '../db/in-shop.ts';
import { loadLamps } from '../db/lamps.ts';
import { findShopFrame } from '../db/people.ts';
import { loadPlaces } from '../db/places.ts';
import type { Deps } from '../deps.ts';
import { localDayOf } from '../planning/local-time.ts';
import type { Actor } from '../policies.ts';

const minutes = z.int().min(1).max(525_600);
const row = z.object({
  kind: closureKind,
  label: z.string().max(120).default(''),
  /** A place or a lamp by name; empty: the whole shop. */
  of: z.string().optional(),
  /** On the shop's wall clock; a bare day is its midnight. */
  starts: z
    .string()
    .transform((text) => (text.length === 10 ? `${text}T00:00` : text.replace(' ', 'T')))
    .pipe(localTime),
  rule: recurrenceRule.optional(),
  minutes: csvNumber.pipe(minutes),
});
const keys = Object.keys(row.shape) as (keyof z.output<typeof row>)[];
type Thing = Pick<ClosureFields, 'placeId' | 'lampId'>;

export function exportClosures(deps: Deps, actor: Actor): Promise<{ fileName: string; csv: string }> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const things = [...(await loadPlaces(trx, shopId)), ...(await loadLamps(trx, shopId))];
    const names = new Map(things.map(({ id, name }) => [id, name]));
    const { timeZone } = await findShopFrame(trx, shopId);
    const rows = (await loadClosures(trx, shopId)).map(({ placeId, lampId, startsLocal, ...closure }) => ({
      ...closure,
      of: names.get(placeId ?? lampId ?? '') ?? null,
      starts: startsLocal.replace('T', ' '),
    }));
    return { fileName: `closures-${localDayOf(deps.now(), timeZone)}.csv`, csv: writeRows(keys, rows) };
  });
}

/** Adds the closures that are not there yet. None is taken away. */
export async function importClosures(deps: Deps, actor: Actor, input: { csv: string; tryOnly: boolean }) {
  const read = readRows(input.csv, row);
  const { shopId } = actor;
  return allOrNothing(deps.db, actor, { lines: read.lines, tryOnly: input.tryOnly }, async (trx) => {
    const things = new Map<string, Thing>([
      ...(await loadPlaces(trx, shopId)).map((p) => [p.name.toLowerCase(), { placeId: p.id, lampId: null }] as const),
      ...(await loadLamps(trx, shopId)).map((l) => [l.name.toLowerCase(), { placeId: null, lampId: l.id }] as const),
    ]);
    const known = new Set((await loadClosures(trx, shopId)).map(keyOf));
    const faults: CsvFault[] = [...read.faults];
    const ids: string[] = [];
    for (const { line, value } of read.rows) {
      const { of, starts, rule, ...rest } = value;
      const thing = of === undefined ? { placeId: null, lampId: null } : things.get(of.toLowerCase());
      if (!thing) {
        faults.push({ line, column: 'of', message: 'There is no place and no lamp of this name.' });
        continue;
      }
      const closure = { ...rest, ...thing, startsLocal: starts, rule: rule ?? null };
      if (known.has(keyOf(closure))) continue;
      known.add(keyOf(closure));
      const id = uuid();
      await insertClosure(trx, shopId, id, closure);
      ids.push(id);
    }
    if (ids.length > 0)
      await recordChange(trx, actor, { kind: 'shop-changed', ids, detail: { closuresImported: ids.length } });
    return { added: ids.length, changed: 0, faults };
  });
}

const keyOf = ({ kind, placeId, lampId, startsLocal, rule, minutes }: ClosureFields | Closure): string =>
  [kind, placeId, lampId, startsLocal, rule, minutes].join(' ');
