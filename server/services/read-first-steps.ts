import type { FirstStep, FirstSteps } from '#contracts/first-steps.ts';
import { loadFirstSteps } from '../db/first-steps.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { isBeingReset } from '../db/wipe-shop.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';
import { sheets } from '../starter/sheets/index.ts';

export const readFirstSteps = (deps: Deps, actor: Actor): Promise<FirstSteps> =>
  inShop(deps.db, actor, (trx) => firstStepsOf(trx, actor.shopId));

/** Which steps are done, told from what the shop has. */
export async function firstStepsOf(trx: Trx, shopId: string): Promise<FirstSteps> {
  const { isDemo, plans, ...has } = await loadFirstSteps(trx, shopId);
  const done: Record<FirstStep, boolean> = {
    hours: has.openings > 0,
    places: has.booths > 0 && has.stations > 0,
    people: has.people > 0,
    sheets: has.sheets > 0,
    job: has.jobs > 0 && plans > 0,
  };
  return {
    steps: (['hours', 'places', 'people', 'sheets', 'job'] as const).map((step) => ({ step, done: done[step] })),
    isDemo,
    resetting: isDemo && (await isBeingReset(trx, shopId)),
    has,
    starter: sheets.map(({ key, name, summary }) => ({ key, name, summary })),
  };
}
