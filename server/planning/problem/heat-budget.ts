import type { Way } from '#contracts/sheets.ts';
import { heatMinutes } from './heat.ts';
import type { WayRefusal } from './refusals.ts';

export type HeatChoice = { stageId: string; ways: readonly Way[] };

/**
 * A limit on the minutes of heat counts over all bakes of a job, those that are done included. The planner chooses each
 * stage's way by itself, so only ways are left that stay within the limit however it chooses: from the first stage on, the
 * longest heat is given up where another way remains (primer can dry by air more easily than clear); a stage whose every
 * way breaks the limit keeps none.
 */
export function withinHeatBudget(choices: readonly HeatChoice[], budget: number): Map<string, Map<string, WayRefusal>> {
  const refused = new Map<string, Map<string, WayRefusal>>();
  const open = choices.map(({ stageId, ways }) => ({ stageId, ways: [...ways] }));
  const most = (ways: readonly Way[]): number => Math.max(0, ...ways.map((way) => heatMinutes(way)));
  const total = (): number => open.reduce((sum, { ways }) => sum + most(ways), 0);
  const drop = (stage: { stageId: string; ways: Way[] }, left: number): void => {
    const longest = most(stage.ways);
    const here = refused.get(stage.stageId) ?? new Map<string, WayRefusal>();
    refused.set(stage.stageId, here);
    for (const way of stage.ways.filter((w) => heatMinutes(w) === longest))
      here.set(way.id, { code: 'heat-minutes', figures: [longest, Math.max(0, left)] });
    stage.ways = stage.ways.filter((way) => heatMinutes(way) < longest);
  };
  const least = (ways: readonly Way[]): number => Math.min(...ways.map((way) => heatMinutes(way)));
  while (total() > budget) {
    const hot = open.filter(({ ways }) => most(ways) > 0);
    const stage = hot.find(({ ways }) => least(ways) < most(ways)) ?? hot.at(-1);
    if (!stage) break;
    const others = total() - most(stage.ways);
    drop(stage, budget - others);
  }
  return refused;
}
