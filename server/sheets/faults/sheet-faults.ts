import type { Coating } from '#contracts/coatings.ts';
import type { SheetFault } from '#contracts/sheet-faults.ts';
import type { SheetBody, SheetGround } from '#contracts/sheets.ts';
import { expandSheet } from '../expand-sheet.ts';
import { choicesOf, timesChosen } from '../options.ts';
import { sprays } from '../way-times.ts';
import { chainFaults } from './chain-faults.ts';
import { coatFaults, sourceFaults } from './coat-faults.ts';
import { coatingOf, type Found, type Given, type Variant } from './found.ts';
import { groundFaults } from './ground-faults.ts';
import { heatFaults } from './heat-faults.ts';
import { nameFaults, waylessFaults } from './name-faults.ts';
import { wayFaults } from './way-faults.ts';

/**
 * Everything that is wrong with a process sheet, in the order of its stages; each fault once, with the options it takes. The same
 * in the browser while one types and on the server before it saves; `ground` null leaves out what only the shop's set-up shows.
 */
export function sheetFaults(
  body: SheetBody,
  coatings: readonly Coating[],
  ground: SheetGround | null = null,
): SheetFault[] {
  const given: Given = { coatings: new Map(coatings.map((one) => [one.id, one])), ground };
  const faults = new Map<string, SheetFault>();
  const keep = (found: readonly Found[], by: Pick<SheetFault, 'withOptions' | 'withoutOptions'>): void => {
    for (const fault of found) {
      const key = [fault.code, fault.stage, fault.way, fault.field, ...fault.names].join('|');
      if (!faults.has(key)) faults.set(key, { ...fault, ...by });
    }
  };
  keep(nameFaults(body, given), { withOptions: [], withoutOptions: [] });
  for (const chosen of choicesOf(body)) {
    const by = departure(body.options, chosen);
    keep(waylessFaults(body, chosen), by);
    keep(faultsOf({ ...given, parts: body.parts, stages: expandSheet(body, chosen) }), by);
  }
  const position = new Map(body.stages.map(({ key }, i) => [key, i]));
  const at = ({ stage }: SheetFault): number => (stage === null ? -1 : (position.get(stage) ?? -1));
  return [...faults.values()].sort((a, b) => at(a) - at(b));
}

/** How a choice of options differs from the usual one. */
function departure(options: SheetBody['options'], chosen: readonly string[]) {
  const labels = (some: SheetBody['options']): string[] => some.map(({ label }) => label);
  const more = ({ key, on }: SheetBody['options'][number]): boolean => timesChosen(chosen, key) > (on ? 1 : 0);
  return {
    withOptions: labels(options.filter(more)),
    withoutOptions: labels(options.filter(({ key, on }) => on && !chosen.includes(key))),
  };
}

function faultsOf(variant: Variant): Found[] {
  return [
    ...variant.stages.flatMap((stage, i) => {
      const own = coatingOf(stage, variant);
      // A stage that only cures is timed by the coating below.
      const cured =
        own ??
        coatingOf(
          variant.stages.slice(0, i).findLast(({ ways }) => ways.some(sprays)),
          variant,
        );
      return stage.ways.flatMap((way) => [
        ...wayFaults(stage, way),
        ...(own ? coatFaults(stage, way, own) : []),
        ...(cured ? sourceFaults(stage, way, cured) : []),
        ...(variant.ground ? groundFaults(stage, way, variant.ground) : []),
      ]);
    }),
    ...chainFaults(variant),
    ...heatFaults(variant),
  ];
}

export const stops = (faults: readonly SheetFault[]): SheetFault[] =>
  faults.filter(({ severity }) => severity === 'stop');
