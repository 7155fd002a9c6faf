import { trainingStanding } from '#chemistry/training/spray-training.ts';
import type { SheetGround } from '#contracts/sheets.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { loadResources, type PersonSetUp } from '../db/resources.ts';
import type { Deps } from '../deps.ts';
import { localDayOf } from '../planning/local-time.ts';
import type { Actor } from '../policies.ts';

export const readSheetGround = (deps: Deps, actor: Actor): Promise<SheetGround> =>
  inShop(deps.db, actor, (trx) => sheetGround(trx, actor.shopId, deps.now()));

/** What the shop has today that process sheets rely on. */
export async function sheetGround(trx: Trx, shopId: string, now: Date): Promise<SheetGround> {
  const { shop, people, lamps, places } = await loadResources(trx, shopId);
  const today = localDayOf(now, shop.timeZone);
  const maySpray = ({ sprayTrainedOn }: PersonSetUp): boolean =>
    !shop.trainingBlocks || ['good', 'ends-soon'].includes(trainingStanding(sprayTrainedOn, today).code);
  const working = people.filter(({ retired }) => !retired);
  const skills = [...new Set(working.flatMap((person) => person.skills))].sort();
  return {
    skills: skills.map((skill) => {
      const able = working.filter((person) => person.skills.includes(skill));
      return { skill, people: able.length, trained: able.filter(maySpray).length };
    }),
    lamps: lamps.filter(({ retired }) => !retired).length,
    places: places
      .filter(({ retired }) => !retired)
      .map(({ kind, units, bakes, bakeLimitCelsius }) => ({ kind, units, bakes, bakeLimitCelsius })),
  };
}
