import { v7 as uuid } from 'uuid';
import { dataSheetFaults } from '#chemistry/sheets/data-sheet-faults.ts';
import type { CsvFault, CsvReport } from '#contracts/csv.ts';
import { allOrNothing } from '../csv/all-or-nothing.ts';
import { readRows, type ReadRow } from '../csv/read-rows.ts';
import { recordChange } from '../db/changes.ts';
import * as coatings from '../db/coatings.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { lockShop } from '../db/locks.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';
import { differing } from './change-coating.ts';
import { coatingRow, sheetFrom, writeCoatings, type CoatingRow } from './coating-lines.ts';

export async function exportCoatings(deps: Deps, actor: Actor): Promise<{ fileName: string; csv: string }> {
  const list = await inShop(deps.db, actor, (trx) => coatings.listCoatings(trx, actor.shopId));
  return { fileName: 'data-sheets.csv', csv: writeCoatings(list) };
}

/** Lines are data sheets by name: new ones are made, those that are there are changed. None is taken out of use. */
export function importCoatings(deps: Deps, actor: Actor, input: { csv: string; tryOnly: boolean }): Promise<CsvReport> {
  const read = readRows(input.csv, coatingRow);
  return allOrNothing(deps.db, actor, { lines: read.lines, tryOnly: input.tryOnly }, async (trx) => {
    await lockShop(trx, actor.shopId);
    const there = await sheetsByName(trx, actor.shopId);
    const faults = [...read.faults];
    const written = { added: [] as string[], changed: [] as string[] };
    const seen = new Set<string>();
    for (const row of read.rows) {
      const key = row.value.name.toLowerCase();
      const before = there.get(key);
      const named = (message: string) => faults.push({ line: row.line, column: 'name', message });
      if (seen.has(key)) named('This name is in the file twice.');
      else if (before && before.retiredAt !== null) named('This data sheet is retired. Bring it back first.');
      else
        faults.push(...(await take(trx, actor.shopId, { row, before, has: read.columns, now: deps.now() }, written)));
      seen.add(key);
    }
    const ids = [...written.added, ...written.changed];
    if (ids.length > 0 && faults.length === 0)
      await recordChange(trx, actor, {
        kind: 'sheets-changed',
        ids,
        detail: { coating: 'imported', lines: ids.length },
      });
    return { added: written.added.length, changed: written.changed.length, faults };
  });
}

async function sheetsByName(trx: Trx, shopId: string): Promise<Map<string, coatings.KeptCoating>> {
  const [used, retired] = [
    await coatings.surveyCoatings(trx, shopId, false),
    await coatings.surveyCoatings(trx, shopId, true),
  ];
  return new Map([...used, ...retired].map((one) => [one.name.toLowerCase(), one]));
}

type Line = {
  row: ReadRow<CoatingRow>;
  before: coatings.KeptCoating | undefined;
  has: ReadonlySet<string>;
  now: Date;
};

async function take(
  trx: Trx,
  shopId: string,
  { row: { line, value }, before, has, now }: Line,
  written: { added: string[]; changed: string[] },
): Promise<CsvFault[]> {
  const read = sheetFrom(value, { before: before?.sheet, has, line });
  if ('faults' in read) return read.faults;
  const wrong = dataSheetFaults(read.sheet).wrong;
  if (wrong.length > 0) return wrong.map(({ code }) => ({ line, column: null, message: wrongWords[code] }));
  const { name, kind } = value;
  if (!before) {
    const id = uuid();
    await coatings.insertCoating(trx, shopId, { id, name, kind, sheet: read.sheet });
    written.added.push(id);
    return [];
  }
  const fields = differing(before, { name, kind, sheet: read.sheet }, now);
  if (Object.keys(fields).length === 0) return [];
  await coatings.updateCoating(trx, shopId, before.id, fields);
  written.changed.push(before.id);
  return [];
}

const wrongWords = {
  'coats-turned': 'The most coats are fewer than the least.',
  'recoat-ends-before-it-begins': 'The recoat window ends before the flash before the next product is over.',
  'bake-above-limit': 'The bake is hotter than the sheet’s own limit.',
  'range-turned': 'The range of temperatures ends below where it begins.',
} as const;
