import type { Reason } from '#contracts/reasons.ts';
import type { SheetFault } from '#contracts/sheet-faults.ts';
import type { SheetBody } from '#contracts/sheets.ts';
import { everyCoating } from '../db/known-coatings.ts';
import type { Trx } from '../db/in-shop.ts';
import { sheetIdNamed } from '../db/sheets.ts';
import { Refusal } from '../errors.ts';
import { sheetFaults, stops } from '../sheets/faults/sheet-faults.ts';
import { sheetGround } from './read-sheet-ground.ts';

/**
 * Refuses a sheet that could never be worked by, or that would hurt the part; what is only doubtful is taken.
 * @throws {Refusal} refused, with a reason for each fault; its first name says where it lies
 */
export async function checkSheet(trx: Trx, shopId: string, body: SheetBody, now: Date): Promise<void> {
  const coatings = await everyCoating(trx, shopId);
  const faults = stops(sheetFaults(body, coatings, await sheetGround(trx, shopId, now)));
  if (faults.length > 0) throw new Refusal('refused', { reasons: faults.map((fault) => toReason(body, fault)) });
}

function toReason(body: SheetBody, fault: SheetFault): Reason {
  const stage = body.stages.find(({ key }) => key === fault.stage);
  const way = stage?.ways.find(({ id }) => id === fault.way);
  const where = [stage?.title, way?.label].filter(Boolean).join(', ');
  return {
    code: `sheet:${fault.code}`,
    rule: null,
    stageId: null,
    ids: [fault.stage, fault.way].filter((key) => key !== null),
    names: [where, ...fault.names],
    at: [],
    minutes: fault.figures,
  };
}

/** @throws {Refusal} bad-request where another sheet of the shop, retired or not, has that name. */
export async function mustBeFree(trx: Trx, shopId: string, name: string, sheetId: string): Promise<void> {
  const holder = await sheetIdNamed(trx, shopId, name);
  if (holder !== undefined && holder !== sheetId)
    throw new Refusal('bad-request', {
      fields: [{ path: 'body.name', message: 'another process sheet has this name' }],
    });
}
