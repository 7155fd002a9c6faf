import type { SheetBody } from '#contracts/sheets.ts';
import { blend, fullSide, newPanel } from './panels.ts';
import { bumper, electricDoor, smallParts, wheels } from './parts.ts';
import type { SheetSeed } from './types.ts';

export const sheets: SheetSeed[] = [bumper, newPanel, fullSide, smallParts, electricDoor, blend, wheels];

/** A sheet as it is stored: `coatingId` says under which id a coating is kept. */
export const bodyOf = (
  { summary, options, parts, stages }: SheetSeed,
  coatingId: (key: string) => string | null,
): SheetBody => ({
  summary,
  options,
  parts,
  stages: stages.map(({ coating, ...stage }) => ({
    ...stage,
    coatingId: coating === null ? null : coatingId(coating),
  })),
});
