import type * as z from 'zod';
import type { ReplyOf } from '#contracts/endpoint.ts';
import type {
  exportSheet as exported,
  exportSheets as exportedCsv,
  importSheet as imported,
} from '#contracts/sheets.ts';
import { writeRows } from '../csv/write-rows.ts';
import { everyCoating } from '../db/known-coatings.ts';
import { inShop } from '../db/in-shop.ts';
import { listSheets } from '../db/sheets.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { csvColumns, csvLines } from '../sheets/csv-lines.ts';
import { fromFile, toFile } from '../sheets/sheet-file.ts';
import { addSheet } from './create-sheet.ts';
import { sheetInShop, type SheetPageReply } from './sheet-page.ts';

/** A sheet as a file. @throws {Refusal} not-found */
export const exportSheet = (deps: Deps, actor: Actor, sheetId: string): Promise<ReplyOf<typeof exported>> =>
  inShop(deps.db, actor, async (trx) => {
    const { name, body } = await sheetInShop(trx, actor.shopId, sheetId);
    return {
      fileName: `${fileNameOf(name)}.json`,
      file: toFile({ name, body }, await everyCoating(trx, actor.shopId)),
    };
  });

/**
 * A file as a new sheet. Sent twice with the same id it is made once.
 * @throws {Refusal} bad-request with every coating that is not there, or the name that is taken; refused with its faults
 */
export const importSheet = (
  deps: Deps,
  actor: Actor,
  { id, file, name }: z.output<typeof imported.body>,
): Promise<SheetPageReply> =>
  inShop(deps.db, actor, async (trx) => {
    const { body, unknown } = fromFile(file, await everyCoating(trx, actor.shopId));
    if (unknown.length > 0)
      throw new Refusal('bad-request', {
        fields: unknown.map(({ stage, coating }) => ({
          path: `body.file.body.stages.${stage}.coating`,
          message: `this shop has no coating “${coating}”`,
        })),
      });
    return addSheet(deps, trx, actor, { id, name: name ?? file.name, body, note: '' });
  });

/** All sheets in use as one table, a line a phase. */
export const exportSheets = (deps: Deps, actor: Actor): Promise<ReplyOf<typeof exportedCsv>> =>
  inShop(deps.db, actor, async (trx) => {
    const coatings = await everyCoating(trx, actor.shopId);
    const lines = (await listSheets(trx, actor.shopId)).flatMap((sheet) => csvLines(sheet, coatings));
    return { fileName: 'process-sheets.csv', csv: writeRows(csvColumns, lines) };
  });

const fileNameOf = (name: string): string =>
  name
    .toLowerCase()
    .normalize('NFKD')
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-|-$/g, '') || 'process-sheet';
