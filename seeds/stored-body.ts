import type { SheetBody } from '#contracts/sheets.ts';
import { bodyOf } from '#server/starter/sheets/index.ts';
import type { SheetSeed } from '#server/starter/sheets/types.ts';
import { demoId } from './ids.ts';

/** A starter sheet as the demo keeps it, with the demo's coatings. */
export const storedBody = (sheet: SheetSeed): SheetBody => bodyOf(sheet, (key) => demoId('coating', key));
