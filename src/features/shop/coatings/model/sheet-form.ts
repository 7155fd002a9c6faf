import { dataSheetFaults, type SheetWrong } from '#chemistry/sheets/data-sheet-faults.ts';
import type { Coating, CoatingKind, CoatingSheet } from '#contracts/coatings.ts';
import type { FormRead } from '../../parts/use-typed-form.ts';
import { figureReader, typedMinutes, typedTemperature, type Faults } from './typed-figures.ts';
import { typedOf } from '../../parts/typed.ts';

/** A data sheet as it is typed: times loosely, temperatures in the reader's unit, nothing where the sheet says nothing. */
export type SheetForm = {
  name: string;
  kind: CoatingKind;
  maker: string;
  edition: string;
  coatsFrom: string;
  coatsTo: string;
  between: string;
  next: string;
  heat: string;
  recoat: string;
  pot: string;
  airMinutes: string;
  airAt: string;
  bakeMinutes: string;
  bakeAt: string;
  measured: 'metal' | 'air';
  heatUp: string;
  shortMinutes: string;
  shortMetres: string;
  mediumMinutes: string;
  mediumMetres: string;
  limit: string;
  holdsFrom: string;
  holdsTo: string;
  energy: string;
  coldBelow: string;
  coldFactor: string;
  dampAbove: string;
  dampFactor: string;
  cautions: string;
};
export type SheetFields = Pick<Coating, 'name' | 'kind' | 'sheet'>;
type Unit = 'C' | 'F';

export function formOf({ name, kind, sheet }: SheetFields, unit: Unit): SheetForm {
  const { airDry, bake, lampShort, lampMedium, holds, coldAir, dampAir } = sheet;
  const at = (celsius: number | undefined) => typedTemperature(celsius ?? null, unit);
  const figure = (value: number | undefined) => typedOf(value ?? null);
  return {
    name,
    kind,
    maker: sheet.maker,
    edition: sheet.edition,
    coatsFrom: String(sheet.coats.from),
    coatsTo: String(sheet.coats.to),
    between: typedMinutes(sheet.flashBetweenCoats),
    next: typedMinutes(sheet.flashBeforeNext),
    heat: typedMinutes(sheet.flashBeforeHeat),
    recoat: typedMinutes(sheet.recoatWithin),
    pot: typedMinutes(sheet.potLife),
    airMinutes: typedMinutes(airDry?.minutes ?? null),
    airAt: at(airDry?.celsius),
    bakeMinutes: typedMinutes(bake?.minutes ?? null),
    bakeAt: at(bake?.celsius),
    measured: bake?.measuredAt ?? 'metal',
    heatUp: figure(bake?.heatUp),
    shortMinutes: typedMinutes(lampShort?.minutes ?? null),
    shortMetres: figure(lampShort?.metres),
    mediumMinutes: typedMinutes(lampMedium?.minutes ?? null),
    mediumMetres: figure(lampMedium?.metres),
    limit: typedTemperature(sheet.heatLimitCelsius, unit),
    holdsFrom: at(holds?.from),
    holdsTo: at(holds?.to),
    energy: typedOf(sheet.kilojoulesPerMole),
    coldBelow: at(coldAir?.belowCelsius),
    coldFactor: figure(coldAir?.factor),
    dampAbove: figure(dampAir?.abovePercent),
    dampFactor: figure(dampAir?.factor),
    cautions: sheet.cautions.join('\n'),
  };
}

/** The data sheet that was typed, or what is wrong in which field. */
export function readSheetForm(form: SheetForm, unit: Unit): FormRead<SheetForm, SheetFields> {
  const read = figureReader(form, unit);
  const coats = { least: 1, most: 12, whole: true };
  /** A line of two figures: neither, or both. */
  const both = <T>(first: keyof SheetForm, second: keyof SheetForm, line: () => T): T | null =>
    read.isEmpty(first) && read.isEmpty(second) ? null : line();
  const lamp = (minutes: 'shortMinutes' | 'mediumMinutes', metres: 'shortMetres' | 'mediumMetres') =>
    both(minutes, metres, () => ({
      minutes: read.minutes(minutes, 1),
      metres: read.number(metres, { least: 0.1, most: 3 }),
    }));
  if (form.name.trim() === '') read.fault('name', 'Enter a name.');
  if (form.name.trim().length > 120) read.fault('name', 'At most 120 characters.');
  const sheet: CoatingSheet = {
    maker: form.maker.trim().slice(0, 120),
    edition: form.edition.trim().slice(0, 60),
    coats: { from: read.number('coatsFrom', coats), to: read.number('coatsTo', coats) },
    flashBetweenCoats: read.minutes('between'),
    flashBeforeNext: read.minutes('next'),
    flashBeforeHeat: read.minutes('heat'),
    recoatWithin: read.isEmpty('recoat') ? null : read.minutes('recoat'),
    potLife: read.isEmpty('pot') ? null : read.minutes('pot', 1),
    airDry: both('airMinutes', 'airAt', () => ({
      minutes: read.minutes('airMinutes', 1),
      celsius: read.celsius('airAt'),
    })),
    bake: both('bakeMinutes', 'bakeAt', () => ({
      minutes: read.minutes('bakeMinutes', 1),
      celsius: read.celsius('bakeAt'),
      measuredAt: form.measured,
      ...(read.isEmpty('heatUp') ? {} : { heatUp: read.number('heatUp', { least: 0, most: 240, whole: true }) }),
    })),
    lampShort: lamp('shortMinutes', 'shortMetres'),
    lampMedium: lamp('mediumMinutes', 'mediumMetres'),
    heatLimitCelsius: read.isEmpty('limit') ? null : read.celsius('limit'),
    holds: both('holdsFrom', 'holdsTo', () => ({ from: read.celsius('holdsFrom'), to: read.celsius('holdsTo') })),
    kilojoulesPerMole: read.isEmpty('energy') ? null : read.number('energy', { least: 1, most: 200 }),
    coldAir: both('coldBelow', 'coldFactor', () => ({
      belowCelsius: read.celsius('coldBelow'),
      factor: read.number('coldFactor', { least: 1, most: 5 }),
    })),
    dampAir: both('dampAbove', 'dampFactor', () => ({
      abovePercent: read.number('dampAbove', { least: 0, most: 100 }),
      factor: read.number('dampFactor', { least: 1, most: 5 }),
    })),
    cautions: linesOf(form.cautions, read.fault),
  };
  return judged({ name: form.name.trim(), kind: form.kind, sheet }, read.faults);
}

function linesOf(text: string, fault: (key: 'cautions', said: string) => unknown): string[] {
  const lines = text
    .split('\n')
    .map((line) => line.trim())
    .filter((line) => line !== '');
  if (lines.length > 12) fault('cautions', 'At most 12 lines.');
  if (lines.some((line) => line.length > 300)) fault('cautions', 'At most 300 characters a line.');
  return lines;
}

const wrongWords: Record<SheetWrong, string> = {
  'coats-turned': 'Not fewer than the least.',
  'recoat-ends-before-it-begins': 'The window would end before the flash before the next product is over.',
  'bake-above-limit': 'Hotter than the sheet’s own limit below.',
  'range-turned': 'Not colder than where it begins.',
};

function judged(value: SheetFields, faults: Faults): FormRead<SheetForm, SheetFields> {
  if (Object.keys(faults).length === 0)
    for (const { code, path } of dataSheetFaults(value.sheet).wrong) faults[fieldOf[path]] ??= wrongWords[code];
  return Object.keys(faults).length === 0 ? { value, faults: null } : { value: null, faults };
}

/** Where a fault of the sheet shows in the form. */
export const fieldOf = {
  coats: 'coatsTo',
  flashBetweenCoats: 'between',
  flashBeforeNext: 'next',
  flashBeforeHeat: 'heat',
  recoatWithin: 'recoat',
  potLife: 'pot',
  airDry: 'airMinutes',
  bake: 'bakeAt',
  lampShort: 'shortMetres',
  lampMedium: 'mediumMinutes',
  heatLimitCelsius: 'limit',
  holds: 'holdsTo',
  kilojoulesPerMole: 'energy',
  coldAir: 'coldBelow',
  dampAir: 'dampAbove',
  cautions: 'cautions',
} as const satisfies Partial<Record<keyof CoatingSheet, keyof SheetForm>>;
