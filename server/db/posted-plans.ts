import type { PlanAir } from './air.ts';
import type { Trx } from './in-shop.ts';

/** Keeps a posted plan whole and makes it the shop's plan. */
export async function insertPostedPlan(
  trx: Trx,
  shopId: string,
  plan: {
    id: string;
    number: number;
    at: Date;
    accountId: string | null;
    cost: number | null;
    body: unknown;
    air: PlanAir;
  },
): Promise<void> {
  await trx('posted_plan').insert({
    shop_id: shopId,
    id: plan.id,
    number: plan.number,
    posted_at: plan.at,
    posted_by: plan.accountId,
    cost: plan.cost,
    body: JSON.stringify(plan.body),
    air: JSON.stringify(plan.air),
  });
  await trx('shop').where({ id: shopId }).update({ plan_number: plan.number });
}

/** The number of the plan everyone works by; 0 before the first. */
export async function findPlanNumber(trx: Trx, shopId: string): Promise<number> {
  const row = await trx('shop')
    .where({ id: shopId })
    .first<{ planNumber: number } | undefined>({ planNumber: 'plan_number' });
  return row?.planNumber ?? 0;
}
