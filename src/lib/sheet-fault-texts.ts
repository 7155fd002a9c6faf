import type { SheetFault, SheetFaultCode } from '#contracts/sheet-faults.ts';
import type { Formats } from './formats.ts';
import { placeKindWords } from './place-kind-words.ts';
import { substrateWords } from './substrate-words.ts';

type Say = (
  given: { names: (i: number) => string; figure: (i: number) => number; all: readonly string[] },
  f: Formats,
) => string;

/** Each fault of a process sheet as a sentence: what is so, and what it should be. Complete by its type. */
export const sheetFaultTexts: Record<SheetFaultCode, Say> = {
  'option-unknown': ({ names }) => `Names the option “${names(0)}”, which this sheet does not have.`,
  'option-twice': ({ names }) => `Two options have the key “${names(0)}”.`,
  'stage-twice': ({ names }) => `Two stages have the key “${names(0)}”.`,
  'way-twice': ({ names }) => `Two ways of this stage have the key “${names(0)}”.`,
  'no-way-left': () => 'Every way belongs to an option that is not chosen: the stage would fall out.',
  'no-stage-left': () => 'Without further options no stage is left.',
  'coating-unknown': () => 'Its coating is not among the data sheets of this shop.',

  'no-place': () => 'No kind of place is chosen, and the part does not stay where it is.',
  'spray-on-rack': () => 'Sprays on a rack. Choose a booth or a prep station.',
  'lamp-no-lamps': () => 'A phase has its lamps on, and no lamp is asked for.',
  'lamps-never-lit': ({ figure }) =>
    figure(0) === 1
      ? 'Asks for a lamp that no phase switches on.'
      : `Asks for ${figure(0)} lamps that no phase switches on.`,
  'hands-no-skill': () => 'Needs hands, and no skill is named: anybody on the roster may get it.',
  'heat-no-temperature': () => 'Heats without a temperature, so no limit of part, booth or vehicle can be kept.',
  'no-purge': ({ figure }, { duration }) =>
    `Heat begins after ${duration(figure(0))}; the air has to be purged for at least ${duration(figure(1))} first.`,

  'flash-short': ({ names, figure }, { duration }) =>
    `${duration(figure(0))} between two coats; the data sheet of ${names(0)} says ${duration(figure(1))}.`,
  'coats-off-sheet': ({ names, figure }) =>
    `${coats(figure(0))}; the data sheet of ${names(0)} says ${figure(1) === figure(2) ? figure(1) : `${figure(1)} to ${figure(2)}`}.`,
  'pot-life': ({ names, figure }, { duration }) =>
    `The last coat begins ${duration(figure(0))} after the first; mixed ${names(0)} is good for ${duration(figure(1))}. Mix twice, or shorten it.`,
  'sheet-differs': ({ names, figure }, { duration }) =>
    `Stands at ${duration(figure(0))} as from the data sheet, and ${names(0)} now says ${duration(figure(1))}.`,

  'stay-first': () => 'Is done where the part stands, and nothing comes before it.',
  'stay-elsewhere': ({ names }) =>
    `Would be done where “${names(0)}” leaves the part. The stage it is meant to follow is not there then.`,
  'bake-before-flash': ({ names, figure }, { duration }) =>
    `Heat begins ${duration(figure(0))} after the last coat of ${names(0)}; its data sheet asks for ${duration(figure(1))} of flash first.`,
  'recoat-early': ({ names, figure }, { duration }) =>
    `The next coat may begin ${duration(figure(0))} after ${names(0)}; its data sheet asks for ${duration(figure(1))}.`,
  'window-closed': ({ figure }, { duration }) =>
    `The window closes after ${duration(figure(0))}, and the stage cannot begin before ${duration(figure(1))}.`,
  'past-recoat': ({ names, figure }, { duration }) =>
    `The first coat may come as late as ${duration(figure(0))} after ${names(0)}, set-up included; its recoat window ends after ${duration(figure(1))}.`,
  'no-window': ({ names, figure }, { duration }) =>
    `No latest start, and the recoat window of ${names(0)} ends after ${duration(figure(0))}.`,

  'above-part': ({ names, figure }, { temperature }) =>
    `Bakes at ${temperature(figure(0))}; ${materialOf(names(0))} stands ${temperature(figure(1), 'limit')}.`,
  'above-film': ({ names, figure }, { temperature }) =>
    `Bakes at ${temperature(figure(0))}; ${names(0)} stands ${temperature(figure(1), 'limit')} by its data sheet.`,
  'above-booth': ({ figure }, { temperature }) =>
    `Bakes at ${temperature(figure(0))}, and no booth may go above ${temperature(figure(1), 'limit')}.`,
  'battery-heat': ({ figure }, { temperature }) =>
    `Only for vehicles with a battery: no way is cool enough. The coolest is ${temperature(figure(0))}; where no limit is recorded they stand ${temperature(figure(1), 'limit')}.`,
  'battery-minutes': ({ figure }, { duration }) =>
    `Only for vehicles with a battery: at least ${duration(figure(0))} of heat in all; where no limit is recorded they stand ${duration(figure(1))}.`,

  'skill-nobody': ({ names, figure }) =>
    figure(0) > 0
      ? `Nobody with the skill “${names(0)}” has spray training that is still good.`
      : `Nobody on the roster has the skill “${names(0)}”.`,
  'lamps-too-few': ({ figure }) => `Needs ${figure(0)} lamps, and the shop has ${figure(1)}.`,
  'place-kind-missing': ({ all }) =>
    `The shop has no ${all.map((kind) => placeKindWords[kind as keyof typeof placeKindWords] ?? kind).join(' or ')}.`,
};

const coats = (n: number): string => (n === 1 ? '1 coat' : `${n} coats`);
const materialOf = (substrate: string): string => substrateWords[substrate as keyof typeof substrateWords] ?? substrate;

export function sheetFaultText(
  { code, names, figures }: Pick<SheetFault, 'code' | 'names' | 'figures'>,
  formats: Formats,
): string {
  return sheetFaultTexts[code]({ names: (i) => names[i] ?? '', figure: (i) => figures[i] ?? 0, all: names }, formats);
}

/** `with Extra coats, without Polish`; empty where it is there as the sheet stands. */
export function faultWhen({ withOptions, withoutOptions }: Pick<SheetFault, 'withOptions' | 'withoutOptions'>): string {
  const named = (word: string, labels: readonly string[]) =>
    labels.length > 0 ? [`${word} ${labels.map((label) => `“${label}”`).join(', ')}`] : [];
  return [...named('with', withOptions), ...named('without', withoutOptions)].join(', ');
}
