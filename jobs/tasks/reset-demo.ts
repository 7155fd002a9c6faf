import { recordChange } from '#server/db/changes.ts';
import { inShop } from '#server/db/in-shop.ts';
import { demoShopId, putBackDemo } from '../../seeds/index.ts';
import { GiveUp, shopOf, type TaskFunction } from '../task-function.ts';

/** What everybody who is in the shop is told, so that all of their pages are fetched anew. */
const told = ['shop-changed', 'people-changed', 'sheets-changed', 'air-read', 'job-changed', 'plan-posted'] as const;

/** Empties the demo shop and fills it again, in one transaction: others see it as it was until it is as on the first day. */
export const resetDemo: TaskFunction = async (deps, task) => {
  const shopId = shopOf(task);
  if (shopId !== demoShopId) throw new GiveUp(`shop ${shopId} is not the demo shop of this program`);
  const scope = { shopId, accountId: null };
  await inShop(deps.db, scope, async (trx) => {
    await putBackDemo(trx, deps.now());
    for (const kind of told) await recordChange(trx, scope, { kind, ids: [shopId] });
  });
};
