import type { Coating } from '#contracts/coatings.ts';
import type { Phase, Sheet, SheetStage, Way } from '#contracts/sheets.ts';

export const csvColumns = [
  'sheet',
  'version',
  'stageNumber',
  'stage',
  'kind',
  'coating',
  'withOption',
  'unlessOption',
  'way',
  'places',
  'stay',
  'skill',
  'lamps',
  'load',
  'cleanUpFamily',
  'gapMin',
  'gapMax',
  'settle',
  'bakeCelsius',
  'phaseNumber',
  'phase',
  'minutes',
  'attendance',
  'lampOn',
  'fromDataSheet',
  'perExtraCoat',
] as const;
type Line = Record<(typeof csvColumns)[number], string | number | boolean | readonly string[] | null>;

/** A sheet as flat lines, one a phase, in the order of the work: for a spreadsheet, not to be read back. */
export function csvLines(sheet: Sheet, coatings: readonly Coating[]): Line[] {
  const labels = new Map(sheet.body.options.map(({ key, label }) => [key, label]));
  const label = (key: string | null | undefined): string | null => (key == null ? null : (labels.get(key) ?? key));
  return sheet.body.stages.flatMap((stage, s) =>
    stage.ways.flatMap((way) =>
      way.phases.map((phase, p) => ({
        sheet: sheet.name,
        version: sheet.version,
        stageNumber: s + 1,
        ...stageCells(stage, coatings),
        withOption: label(way.option ?? stage.option),
        unlessOption: label(way.unlessOption ?? stage.unlessOption),
        ...wayCells(way),
        phaseNumber: p + 1,
        ...phaseCells(phase),
        perExtraCoat: label(phase.perExtraCoat),
      })),
    ),
  );
}

const stageCells = ({ title, kind, coatingId }: SheetStage, coatings: readonly Coating[]) => ({
  stage: title,
  kind,
  coating: coatings.find(({ id }) => id === coatingId)?.name ?? null,
});

const wayCells = ({ label, placeKinds, stay, skill, lampCount, load, family, gap, bakeCelsius }: Way) => ({
  way: label,
  places: placeKinds,
  stay,
  skill,
  lamps: lampCount,
  load,
  cleanUpFamily: family,
  gapMin: gap.min,
  gapMax: gap.max,
  settle: gap.settle,
  bakeCelsius,
});

const phaseCells = ({ kind, minutes, attendance, lamp, source }: Phase) => ({
  phase: kind,
  minutes,
  attendance,
  lampOn: lamp === true,
  fromDataSheet: source ?? null,
});
