import type { SheetBody } from '#contracts/sheets.ts';
import { demoId } from '../ids.ts';
import { blend, fullSide, newPanel } from './panels.ts';
import { bumper, electricDoor, smallParts, wheels } from './parts.ts';
import type { SheetSeed } from './types.ts';

export const sheets: SheetSeed[] = [bumper, newPanel, fullSide, smallParts, electricDoor, blend, wheels];

/** A seed's sheet as it is stored: coatings by their ids. */
export const bodyOf = ({ summary, options, parts, stages }: SheetSeed): SheetBody => ({
  summary,
  options,
  parts,
  stages: stages.map(({ coating, ...stage }) => ({
    ...stage,
    coatingId: coating === null ? null : demoId('coating', coating),
  })),
});
