import type { Coating } from '#contracts/coatings.ts';
import type { Sheet } from '#contracts/sheets.ts';
import * as coatings from '../db/coatings.ts';
import { inShop } from '../db/in-shop.ts';
import * as sheets from '../db/sheets.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';

export const listSheets = async (deps: Deps, actor: Actor): Promise<{ sheets: Sheet[] }> => ({
  sheets: await inShop(deps.db, actor, (trx) => sheets.listSheets(trx, actor.shopId)),
});

export const listCoatings = async (deps: Deps, actor: Actor): Promise<{ coatings: Coating[] }> => ({
  coatings: await inShop(deps.db, actor, (trx) => coatings.listCoatings(trx, actor.shopId)),
});
