import type * as z from 'zod';
import type { listPeople as contract } from '#contracts/people.ts';
import { inShop } from '../db/in-shop.ts';
import { findShopFrame, listSkills, listTies, loadPeople } from '../db/people.ts';
import type { Deps } from '../deps.ts';
import { localDayOf } from '../planning/local-time.ts';
import { may, type Actor } from '../policies.ts';
import { personView } from './person-view.ts';

export function listPeople(deps: Deps, actor: Actor): Promise<z.input<(typeof contract)['reply']>> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const { timeZone, trainingBlocks } = await findShopFrame(trx, shopId);
    const today = localDayOf(deps.now(), timeZone);
    const people = await loadPeople(trx, shopId);
    return {
      people: people.map((row) => personView(row, today)),
      skills: await listSkills(trx, shopId),
      members: may.setUp(actor) ? await listTies(trx, shopId) : [],
      trainingBlocks,
    };
  });
}
