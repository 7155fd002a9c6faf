import { gapFromSheet } from '#chemistry/sheets/gap-from-sheet.ts';
import { minutesFromSheet } from '#chemistry/sheets/minutes-from-sheet.ts';
import type { Coating } from '#contracts/coatings.ts';
import type { Phase, SheetStage } from '#contracts/sheets.ts';

/** The stage with every minute that says it comes from the data sheet taken from it anew. `below`: what its gap goes by. */
export const retimedStage = (
  stage: SheetStage,
  coating: Coating | null,
  below: Coating | null,
): Pick<SheetStage, 'ways'> => ({
  ways: stage.ways.map((way) => ({
    ...way,
    gap: below ? gapFromSheet(way.gap, below.sheet) : way.gap,
    phases: coating ? way.phases.map((phase) => retimed(phase, coating)) : way.phases,
  })),
});

function retimed(phase: Phase, { sheet }: Coating): Phase {
  const minutes = phase.source === undefined ? null : minutesFromSheet(phase.source, sheet);
  return minutes === null ? phase : { ...phase, minutes };
}
