import { blend, fullSide, newPanel } from './panels.ts';
import { bumper, electricDoor, smallParts, wheels } from './parts.ts';
import { onlyTrueSources } from './true-sources.ts';
import type { SheetSeed } from './types.ts';

export const sheets: SheetSeed[] = [bumper, newPanel, fullSide, smallParts, electricDoor, blend, wheels].map(
  onlyTrueSources,
);
