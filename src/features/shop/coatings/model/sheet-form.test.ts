import { describe, expect, it } from 'vitest';
import { coatingKind, coatingSheet, emptySheet, type CoatingSheet } from '#contracts/coatings.ts';
import { formatsFor } from '#src/lib/formats.ts';
import { sampleCoating } from '../testing/sample-coating.ts';
import { doubtsOf } from './doubt-words.ts';
import { filmOf } from './film-pieces.ts';
import { keyFigures } from './key-figures.ts';
import { filledIn, offersFor } from './practice.ts';
import { formOf, readSheetForm, type SheetForm } from './sheet-form.ts';
import { typedMinutes } from './typed-figures.ts';

const whole: CoatingSheet = {
  ...sampleCoating.sheet,
  maker: 'A maker',
  edition: '3',
  bake: { minutes: 30, celsius: 60, measuredAt: 'air', heatUp: 12 },
  lampShort: { minutes: 20, metres: 0.75 },
  lampMedium: { minutes: 40, metres: 0.8 },
  heatLimitCelsius: 80,
  holds: { from: 15, to: 30 },
  kilojoulesPerMole: 44,
  coldAir: { belowCelsius: 18, factor: 1.25 },
  dampAir: { abovePercent: 75, factor: 1.5 },
};
const form = formOf({ ...sampleCoating, sheet: whole }, 'C');
const faultsOf = (more: Partial<SheetForm>, unit: 'C' | 'F' = 'C') =>
  readSheetForm({ ...form, ...more }, unit).faults ?? {};
const say = formatsFor({ zone: 'Europe/Berlin', clock: '24', unit: 'F' });

describe('the form of a data sheet', () => {
  it.each(['C', 'F'] as const)('gives back in %s what was put in', (unit) => {
    for (const sheet of [whole, sampleCoating.sheet, emptySheet]) {
      const fields = { name: 'Clear', kind: 'clear' as const, sheet };
      expect(readSheetForm(formOf(fields, unit), unit).value).toEqual(fields);
    }
  });

  it('shows and reads Fahrenheit: 60 C is 140 F, and 120 F is 48.889 C, never more (120 F: several makers of electric cars)', () => {
    const inF = formOf({ ...sampleCoating, sheet: whole }, 'F');
    expect(inF.bakeAt).toBe('140');
    const read = readSheetForm({ ...inF, bakeAt: '120' }, 'F').value;
    expect(read?.sheet.bake?.celsius).toBeCloseTo(48.889, 3);
  });

  it('takes times as they are typed', () => {
    const read = readSheetForm(
      { ...form, recoat: '3 days', pot: '1 h 30', airMinutes: '12h', between: '7' },
      'C',
    ).value;
    expect(read?.sheet).toMatchObject({
      recoatWithin: 4320,
      potLife: 90,
      airDry: { minutes: 720 },
      flashBetweenCoats: 7,
    });
    expect([0, 45, 90, 120, 150, 720, 1440, 4320, 4321].map(typedMinutes)).toEqual([
      '0',
      '45',
      '90',
      '2 h',
      '2 h 30 min',
      '12 h',
      '24 h',
      '3 days',
      '72 h 1 min',
    ]);
  });

  it.each<[Partial<SheetForm>, keyof SheetForm]>([
    [{ name: ' ' }, 'name'],
    [{ between: '' }, 'between'],
    [{ between: 'soon' }, 'between'],
    [{ coatsTo: '1' }, 'coatsTo'],
    [{ next: '90', recoat: '60' }, 'recoat'],
    [{ limit: '55' }, 'bakeAt'],
    [{ holdsFrom: '30', holdsTo: '20' }, 'holdsTo'],
    [{ airAt: '' }, 'airAt'],
    [{ shortMetres: '' }, 'shortMetres'],
    [{ coldFactor: '0.5' }, 'coldFactor'],
    [{ bakeAt: '500' }, 'bakeAt'],
  ])('%o is wrong at %s', (more, field) => {
    expect(Object.keys(faultsOf(more))).toEqual([field]);
  });

  it('says limits in the reader’s unit', () => {
    expect(faultsOf({ bakeAt: '999' }, 'F').bakeAt).toBe('Enter °F from 14 to 392.');
  });

  it('sends nothing that the contract would not take', () => {
    expect(coatingSheet.safeParse(readSheetForm(form, 'C').value?.sheet).success).toBe(true);
  });
});

describe('common practice', () => {
  it('fills what is empty or untouched and nothing that was typed', () => {
    const untouched = formOf({ name: '', kind: 'primer', sheet: emptySheet }, 'F');
    const offers = offersFor('primer', 'F');
    const fill = filledIn({ ...untouched, between: '4' }, untouched, offers);
    // Trade figures: 2 to 3 coats, 10 to 20 min before heat, 15 to 30 min at 60 C (140 F), 3 h in the air.
    expect(fill).toMatchObject({ coatsTo: '3', heat: '20', bakeMinutes: '30', bakeAt: '140', airMinutes: '3 h' });
    expect(fill).not.toHaveProperty('between');
  });
  it('offers for every kind either something or nothing, never a broken sheet', () => {
    for (const kind of coatingKind.options) {
      const untouched = formOf({ name: 'x', kind, sheet: emptySheet }, 'C');
      const fill = filledIn(untouched, untouched, offersFor(kind, 'C'));
      expect(readSheetForm({ ...untouched, ...fill }, 'C').faults).toBeNull();
    }
  });
});

it('draws the coats, the flashes and the bake with its heat-up', () => {
  const { pieces, words } = filmOf(sampleCoating.sheet, say);
  expect(pieces).toEqual([
    { kind: 'spray', size: 6 },
    { kind: 'flash', size: 10 },
    { kind: 'spray', size: 6 },
    { kind: 'flash', size: 12 },
    { kind: 'bake', size: 40 },
  ]);
  expect(words).toBe('2 coats with 10 min between, 12 min before heat, 40 min bake with its heat-up.');
});

it('says doubts and key figures in words', () => {
  expect(doubtsOf({ ...sampleCoating.sheet, coats: { from: 2, to: 4 }, potLife: 20 }, say)).toEqual([
    'Pot life shorter than its coats: 20 min, but the last coat begins 30 min after the first or later. Mix anew for it.',
  ]);
  expect(keyFigures(sampleCoating.sheet, say)).toEqual([
    { label: 'Coats', text: '2 coats, 10 min between' },
    { label: 'Recoat', text: 'at once to 3 days' },
    { label: 'Pot life', text: '2 h' },
    { label: 'Cure', text: '30 min at 140 °F metal or 12 h in air' },
  ]);
});
