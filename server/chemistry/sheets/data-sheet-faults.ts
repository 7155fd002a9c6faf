import { unusualEnergy, type EnergyCode } from '#chemistry/cure/fit-activation-energy.ts';
import type { Finding } from '#chemistry/finding.ts';
import { BOOTH_AIR_LIMITS_CELSIUS } from '#chemistry/limits/heat-sources.ts';
import { energyOfSheet, linesContradict } from './energy-of-sheet.ts';
import type { SheetFigures } from './figures.ts';

/** Cannot be: such a sheet is not kept. */
export type SheetWrong = 'coats-turned' | 'recoat-ends-before-it-begins' | 'bake-above-limit' | 'range-turned';
/** Can be, but looks like a slip of the keyboard or asks for care. */
export type SheetDoubt =
  | EnergyCode
  | 'pot-life-shorter-than-coats'
  | 'no-cure'
  | 'hotter-not-faster'
  | 'bake-above-booth-air'
  | 'heat-before-flashed'
  | 'medium-wave-faster-than-short'
  | 'lamp-distance-unusual'
  | 'air-dry-outside-range'
  | 'mixed-without-caution';

/** `path`: the line of the sheet it is shown at. Value and limit as in Finding: minutes, C, kJ/mol or metres. */
type At = { path: keyof SheetFigures | 'cautions' };
export type DataSheetFaults = { wrong: (Finding<SheetWrong> & At)[]; doubts: (Finding<SheetDoubt> & At)[] };

/** What is wrong with a data sheet or worth a second look, beyond the range of each single figure. */
export function dataSheetFaults(sheet: SheetFigures & { cautions: readonly string[] }): DataSheetFaults {
  return { wrong: wrongOf(sheet), doubts: [...timeDoubts(sheet), ...cureDoubts(sheet), ...lampDoubts(sheet)] };
}

function wrongOf(sheet: SheetFigures): DataSheetFaults['wrong'] {
  const { coats, recoatWithin, flashBeforeNext, bake, heatLimitCelsius, holds } = sheet;
  const wrong: DataSheetFaults['wrong'] = [];
  if (coats.to < coats.from) wrong.push({ code: 'coats-turned', path: 'coats', value: coats.to, limit: coats.from });
  if (recoatWithin !== null && recoatWithin < flashBeforeNext)
    wrong.push({
      code: 'recoat-ends-before-it-begins',
      path: 'recoatWithin',
      value: recoatWithin,
      limit: flashBeforeNext,
    });
  if (bake && heatLimitCelsius !== null && bake.celsius > heatLimitCelsius)
    wrong.push({ code: 'bake-above-limit', path: 'bake', value: bake.celsius, limit: heatLimitCelsius });
  if (holds && holds.to < holds.from)
    wrong.push({ code: 'range-turned', path: 'holds', value: holds.to, limit: holds.from });
  return wrong;
}

function timeDoubts(sheet: SheetFigures & { cautions: readonly string[] }): DataSheetFaults['doubts'] {
  const { coats, flashBetweenCoats, flashBeforeHeat, potLife, cautions } = sheet;
  const doubts: DataSheetFaults['doubts'] = [];
  // The last coat begins after so many flashes at the earliest; spraying comes on top.
  const lastCoatAfter = (coats.to - 1) * flashBetweenCoats;
  if (potLife !== null && potLife < lastCoatAfter)
    doubts.push({ code: 'pot-life-shorter-than-coats', path: 'potLife', value: potLife, limit: lastCoatAfter });
  // What is mixed with a hardener has a pot life, and most hardeners are isocyanates.
  if (potLife !== null && cautions.length === 0)
    doubts.push({ code: 'mixed-without-caution', path: 'cautions', value: 0, limit: 1 });
  const isHeated = sheet.bake ?? sheet.lampShort ?? sheet.lampMedium;
  if (isHeated && coats.to > 1 && flashBeforeHeat < flashBetweenCoats)
    doubts.push({
      code: 'heat-before-flashed',
      path: 'flashBeforeHeat',
      value: flashBeforeHeat,
      limit: flashBetweenCoats,
    });
  return doubts;
}

function cureDoubts(sheet: SheetFigures): DataSheetFaults['doubts'] {
  const { airDry, bake, lampShort, lampMedium, holds } = sheet;
  const doubts: DataSheetFaults['doubts'] = [];
  if (!airDry && !bake && !lampShort && !lampMedium)
    doubts.push({ code: 'no-cure', path: 'airDry', value: 0, limit: 1 });
  if (airDry && bake && linesContradict(airDry, bake))
    doubts.push({ code: 'hotter-not-faster', path: 'bake', value: bake.minutes, limit: airDry.minutes });
  const energy = energyOfSheet(sheet);
  const unusual = energy.from === 'default' ? null : unusualEnergy(energy.kilojoulesPerMole);
  if (unusual) doubts.push({ ...unusual, path: 'kilojoulesPerMole' });
  // The stricter of the rules for booth air (International Fire Code 2018, ch. 24: 93 C).
  if (bake && bake.measuredAt === 'air' && bake.celsius > BOOTH_AIR_LIMITS_CELSIUS.us)
    doubts.push({
      code: 'bake-above-booth-air',
      path: 'bake',
      value: bake.celsius,
      limit: BOOTH_AIR_LIMITS_CELSIUS.us,
    });
  if (airDry && holds && (airDry.celsius < holds.from || airDry.celsius > holds.to))
    doubts.push({
      code: 'air-dry-outside-range',
      path: 'airDry',
      value: airDry.celsius,
      limit: airDry.celsius < holds.from ? holds.from : holds.to,
    });
  return doubts;
}

/** Usual distance of a cure lamp, metres (from memory). */
const USUAL_DISTANCE = { least: 0.6, most: 0.9 } as const;

function lampDoubts({ lampShort, lampMedium }: SheetFigures): DataSheetFaults['doubts'] {
  const doubts: DataSheetFaults['doubts'] = [];
  // Medium wave takes about twice as long as short (trade article).
  if (lampShort && lampMedium && lampMedium.minutes < lampShort.minutes)
    doubts.push({
      code: 'medium-wave-faster-than-short',
      path: 'lampMedium',
      value: lampMedium.minutes,
      limit: lampShort.minutes,
    });
  for (const [path, lamp] of [
    ['lampShort', lampShort],
    ['lampMedium', lampMedium],
  ] as const) {
    if (!lamp) continue;
    const limit = lamp.metres < USUAL_DISTANCE.least ? USUAL_DISTANCE.least : USUAL_DISTANCE.most;
    if (lamp.metres < USUAL_DISTANCE.least || lamp.metres > USUAL_DISTANCE.most)
      doubts.push({ code: 'lamp-distance-unusual', path, value: lamp.metres, limit });
  }
  return doubts;
}
