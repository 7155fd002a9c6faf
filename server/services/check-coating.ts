import { dataSheetFaults } from '#chemistry/sheets/data-sheet-faults.ts';
import type { CoatingSheet } from '#contracts/coatings.ts';
import { coatingNamed } from '../db/coatings.ts';
import type { Trx } from '../db/in-shop.ts';
import { Refusal } from '../errors.ts';

type Fault = { path: string; message: string };

/** What cannot be in a data sheet, at the line it is about; doubts are the browser's to show. */
export const faultsOfSheet = (sheet: CoatingSheet): Fault[] =>
  dataSheetFaults(sheet).wrong.map(({ code, path }) => ({ path: `body.sheet.${path}`, message: code }));

export const nameTaken: Fault = { path: 'body.name', message: 'another data sheet has this name' };

/** The shop's row is held by the caller, so that no two take one name. @throws {Refusal} bad-request with fields */
export async function checkCoating(
  trx: Trx,
  shopId: string,
  { id, name, sheet }: { id: string; name: string; sheet: CoatingSheet },
): Promise<void> {
  const named = await coatingNamed(trx, shopId, name);
  const fields = [...(named && named.id !== id ? [nameTaken] : []), ...faultsOfSheet(sheet)];
  if (fields.length > 0) throw new Refusal('bad-request', { fields });
}
