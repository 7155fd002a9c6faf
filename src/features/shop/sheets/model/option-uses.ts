import type { SheetBody } from '#contracts/sheets.ts';

/** What an option does in a sheet, in a few words each; empty: nothing names it yet. */
export function usesOf({ stages }: Pick<SheetBody, 'stages'>, key: string): string[] {
  const uses = stages.flatMap((stage) => [
    ...(stage.option === key ? [`adds ${stage.title}`] : []),
    ...(stage.unlessOption === key ? [`leaves out ${stage.title}`] : []),
    ...stage.ways.flatMap((way) => [
      ...(way.option === key ? [`${stage.title}: ${way.label}`] : []),
      ...(way.unlessOption === key ? [`${stage.title}: not ${way.label}`] : []),
      ...(way.phases.some(({ perExtraCoat }) => perExtraCoat === key) ? [`coats of ${stage.title}`] : []),
    ]),
  ]);
  return [...new Set(uses)];
}
