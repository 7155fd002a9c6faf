import { bakeMinutesOnTheClock } from '#chemistry/cure/bake-minutes.ts';
import type { MinutesSource, SheetFigures } from './figures.ts';

/** Until the metal follows the booth's air, where the shop has not measured its own (from memory; editable). */
export const DEFAULT_HEAT_UP_MINUTES = 10;

/**
 * Minutes that a data sheet gives for a phase; null where it gives none: its line is empty, or it is the spraying of a coat,
 * which takes as long as the painter takes. A bake counted from the metal has the heat-up on top.
 */
export function minutesFromSheet(source: MinutesSource, sheet: SheetFigures): number | null {
  switch (source) {
    case 'coat':
      return null;
    case 'flash-between':
      return sheet.flashBetweenCoats;
    case 'flash-next':
      return sheet.flashBeforeNext;
    case 'flash-heat':
      return sheet.flashBeforeHeat;
    case 'bake':
      return sheet.bake && bakeMinutes(sheet.bake);
    case 'lamp-short':
      return sheet.lampShort?.minutes ?? null;
    case 'lamp-medium':
      return sheet.lampMedium?.minutes ?? null;
    case 'air':
      return sheet.airDry?.minutes ?? null;
  }
}

const bakeMinutes = ({ minutes, measuredAt, heatUp }: NonNullable<SheetFigures['bake']>): number =>
  bakeMinutesOnTheClock({ minutes, reference: measuredAt, heatUpMinutes: heatUp ?? DEFAULT_HEAT_UP_MINUTES });
