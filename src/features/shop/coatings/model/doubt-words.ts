import { dataSheetFaults, type SheetDoubt } from '#chemistry/sheets/data-sheet-faults.ts';
import type { CoatingSheet } from '#contracts/coatings.ts';
import type { Formats } from '#src/lib/formats.ts';

type Say = Pick<Formats, 'duration' | 'temperature'>;
type Figures = { value: number; limit: number };

const words: Record<SheetDoubt, (figures: Figures, say: Say) => string> = {
  'pot-life-shorter-than-coats': ({ value, limit }, { duration }) =>
    `Pot life shorter than its coats: ${duration(value)}, but the last coat begins ${duration(limit)} after the first or later. Mix anew for it.`,
  'mixed-without-caution': () =>
    'A pot life means a hardener, and most hardeners hold isocyanates. Say so among the cautions, or that it does not.',
  'heat-before-flashed': ({ value, limit }, { duration }) =>
    `Heat after ${duration(value)}, sooner than another coat after ${duration(limit)}. Trapped solvent boils.`,
  'no-cure': () => 'It says nothing of how it cures: no air dry, no bake, no lamp.',
  'hotter-not-faster': ({ value, limit }, { duration }) =>
    `The bake takes ${duration(value)} and the colder air dry ${duration(limit)}: one of them is mistyped, or they mean different things.`,
  'activation-energy-unusually-low': ({ value, limit }) =>
    `Its two cure times mean ${value.toFixed(0)} kJ/mol, less than ${limit}: look at both again.`,
  'activation-energy-unusually-high': ({ value, limit }) =>
    `Its cure means ${value.toFixed(0)} kJ/mol, more than ${limit}: look at its times again.`,
  'bake-above-booth-air': ({ value, limit }, { temperature }) =>
    `Booth air of ${temperature(value)} is above ${temperature(limit, 'limit')}, the most a fire code allows while drying.`,
  'air-dry-outside-range': ({ limit }, { temperature }) =>
    `The air dry is printed for a temperature outside the range in which the sheet holds (${temperature(limit)}).`,
  'medium-wave-faster-than-short': ({ value, limit }, { duration }) =>
    `Medium wave takes ${duration(value)} and short wave ${duration(limit)}; medium usually takes about twice as long.`,
  'lamp-distance-unusual': ({ value }) =>
    `${value} m is outside the usual 0.6 to 0.9 m: look into the lamp’s sheet too.`,
};

/** What is worth a second look, in the order of the sheet. */
export const doubtsOf = (sheet: CoatingSheet, say: Say): string[] =>
  dataSheetFaults(sheet).doubts.map(({ code, value, limit }) => words[code]({ value, limit }, say));
