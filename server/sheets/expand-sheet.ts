import type { Phase, SheetBody, SheetStage, Way } from '#contracts/sheets.ts';
import { isThere, timesChosen, type Chosen } from './options.ts';

/** A stage as a job gets it: what options decide is settled. */
export type SettledStage = Pick<SheetStage, 'key' | 'kind' | 'title' | 'coatingId' | 'ways'>;

/**
 * What is left of a sheet once its options are chosen: stages and ways that belong to them or fall out by them, and as many
 * extra coats as were asked for. A stage none of whose ways is left falls out. The result names no options any more.
 */
export function expandSheet(body: Pick<SheetBody, 'stages'>, chosen: Chosen): SettledStage[] {
  return body.stages.flatMap((stage) => {
    if (!isThere(stage, chosen)) return [];
    const ways = stage.ways.filter((way) => isThere(way, chosen)).flatMap((way) => settledWay(way, chosen));
    if (ways.length === 0) return [];
    const { key, kind, title, coatingId } = stage;
    return [{ key, kind, title, coatingId, ways }];
  });
}

function settledWay({ option: _, unlessOption: _unless, ...way }: Way, chosen: Chosen): Way[] {
  const phases = withExtraCoats(way.phases, chosen);
  return phases.length === 0 ? [] : [{ ...way, phases }];
}

/** Neighbours that belong to the same option are one extra coat with its flash, and come as often as it is chosen. */
function withExtraCoats(phases: readonly Phase[], chosen: Chosen): Phase[] {
  const settled: Phase[] = [];
  for (let i = 0; i < phases.length;) {
    const option = phases[i]?.perExtraCoat;
    let end = i + 1;
    while (option !== undefined && phases[end]?.perExtraCoat === option) end++;
    const group = phases.slice(i, end).map(({ perExtraCoat: _, ...phase }) => phase);
    const times = option === undefined ? 1 : timesChosen(chosen, option);
    for (let n = 0; n < times; n++) settled.push(...group.map((phase) => ({ ...phase })));
    i = end;
  }
  return settled;
}
