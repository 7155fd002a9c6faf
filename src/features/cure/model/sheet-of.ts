import type { Coating } from '#contracts/coatings.ts';
import { cureKinetics, type Kinetics } from '#chemistry/cure/kinetics.ts';
import type { PrintedPoint } from '#chemistry/printed-points.ts';
import type { Values } from './desk-state.ts';
import { ranges, reader, type Answer } from './reader.ts';
import type { Unit } from './typed.ts';

/** What the calculators need of a data sheet; a coating of the shop has it, or it is typed on the desk. */
export type Sheet = Pick<
  Coating['sheet'],
  | 'coats'
  | 'flashBetweenCoats'
  | 'flashBeforeNext'
  | 'flashBeforeHeat'
  | 'airDry'
  | 'bake'
  | 'lampShort'
  | 'lampMedium'
  | 'kilojoulesPerMole'
  | 'cautions'
> & { name: string };

/** Value of the list of coatings for a sheet that is typed. */
export const typedSheet = 'typed';

/** Which coating is meant: by the address, else the first of the shop, else a typed one. */
export function chosenCoating(coatings: readonly Coating[], wanted: string): Coating | null {
  if (wanted === typedSheet) return null;
  return coatings.find(({ id }) => id === wanted) ?? coatings[0] ?? null;
}

/** True where a link names a coating that this shop does not have. */
export const namesAStranger = (coatings: readonly Coating[], wanted: string): boolean =>
  wanted !== '' && wanted !== typedSheet && !coatings.some(({ id }) => id === wanted);

export function sheetOf(coating: Coating | null, values: Values, unit: Unit): Answer<Sheet> {
  if (coating) return { ok: true, errors: {}, value: { ...coating.sheet, name: coating.name } };
  const read = reader(values, unit);
  const between = read.number('between', ranges.minutesOrNone);
  const next = read.number('next', ranges.minutesOrNone);
  const heat = read.number('heat', ranges.minutesOrNone);
  const dry = values.dry.trim() === '' ? null : read.number('dry', ranges.minutes);
  const dryAt = read.celsius('dryat', ranges.air);
  const bake = values.bake.trim() === '' ? null : read.number('bake', ranges.minutes);
  const bakeAt = bake === null ? NaN : read.celsius('bakeat', { least: 25, most: 200 });
  return read.answer(() => ({
    name: 'The sheet you typed',
    coats: { from: 1, to: 1 },
    flashBetweenCoats: between,
    flashBeforeNext: next,
    flashBeforeHeat: heat,
    airDry: dry === null ? null : { minutes: dry, celsius: dryAt },
    bake:
      bake === null
        ? null
        : { minutes: bake, celsius: bakeAt, measuredAt: values.measured === 'air' ? 'air' : 'metal' },
    lampShort: null,
    lampMedium: null,
    kilojoulesPerMole: null,
    cautions: [],
  }));
}

/** Where flash times without a temperature of their own are taken to hold: the sheet's air-dry line, else 20 C. */
export const flashCelsius = (sheet: Sheet): number => sheet.airDry?.celsius ?? 20;

export type CureOf = {
  kinetics: Kinetics;
  /** Where the energy comes from: fitted to the sheet's two lines, set on the sheet by the shop, the default, or typed. */
  energyFrom: 'sheet' | 'set' | 'default' | 'typed';
  /** Two lines of which the hotter is no faster: one of them is mistyped, and only the bake was used. */
  contradiction: boolean;
};

/** Kinetics of a sheet; null where it prints neither a bake nor an air-dry time. */
export function cureOf(sheet: Sheet, typedKilojoules: number | null): CureOf | null {
  const points = [sheet.airDry, sheet.bake]
    .filter((point) => point !== null)
    .filter(({ minutes }) => minutes > 0)
    .map(({ minutes, celsius }): PrintedPoint => ({ minutes, celsius }));
  const hottest = points.toSorted((a, b) => b.celsius - a.celsius)[0];
  if (!hottest) return null;
  const given = typedKilojoules ?? sheet.kilojoulesPerMole;
  if (given !== null) {
    const kinetics = cureKinetics([hottest], given);
    // It was given, not assumed.
    const findings = kinetics.findings.filter(({ code }) => code !== 'activation-energy-assumed');
    const energyFrom = typedKilojoules === null ? 'set' : 'typed';
    return { kinetics: { ...kinetics, findings }, energyFrom, contradiction: false };
  }
  const coldest = points.find((point) => point.celsius < hottest.celsius);
  const contradiction = points.length > 1 && (!coldest || coldest.minutes <= hottest.minutes);
  if (!coldest || contradiction) return { kinetics: cureKinetics([hottest]), energyFrom: 'default', contradiction };
  return { kinetics: cureKinetics([coldest, hottest]), energyFrom: 'sheet', contradiction };
}
