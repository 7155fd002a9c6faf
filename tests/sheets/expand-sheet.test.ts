import { describe, expect, test } from 'vitest';
import { expandSheet } from '#server/sheets/expand-sheet.ts';
import { choicesOf } from '#server/sheets/options.ts';
import { airDry, body, boothBake, coats, hands, alone, option, sprayed, stage, way } from './factories.ts';

const keys = (chosen: string[], of = wetOnWet) => expandSheet(of, chosen).map(({ key }) => key);

/** What a job can ask for in a refinish shop (common practice): each as an option of one sheet. */
const wetOnWet = body(
  [
    stage('fill', [way()], { option: 'filler' }),
    stage('promoter', [sprayed(coats(1, 5, 0))], { option: 'promoter' }),
    stage('prime', [sprayed(coats(2, 6, 10))], { unlessOption: 'wet-on-wet' }),
    stage('bake-primer', [airDry()], { unlessOption: 'wet-on-wet' }),
    stage('block', [way()], { unlessOption: 'wet-on-wet' }),
    stage('seal', [sprayed(coats(1, 6, 0))], { option: 'wet-on-wet' }),
    stage('base', [
      sprayed(coats(3, 6, 10), { id: 'after-sanding', unlessOption: 'wet-on-wet' }),
      sprayed(coats(3, 6, 10), { id: 'on-the-spot', option: 'wet-on-wet', stay: true, placeKinds: [] }),
    ]),
  ],
  { options: ['filler', 'promoter', 'wet-on-wet'].map((key) => option(key)) },
);

describe('options of a sheet', () => {
  test('switch stages on and off: filler, adhesion promoter, wet on wet instead of sanding', () => {
    expect(keys([])).toEqual(['prime', 'bake-primer', 'block', 'base']);
    expect(keys(['filler', 'promoter'])).toEqual(['fill', 'promoter', 'prime', 'bake-primer', 'block', 'base']);
    expect(keys(['wet-on-wet'])).toEqual(['seal', 'base']);
  });

  test('choose among ways, and leave no condition in what a job keeps', () => {
    const ways = (chosen: string[]) => expandSheet(wetOnWet, chosen).at(-1)?.ways ?? [];
    expect(ways([]).map(({ id }) => id)).toEqual(['after-sanding']);
    expect(ways(['wet-on-wet']).map(({ id }) => id)).toEqual(['on-the-spot']);
    expect(Object.keys(ways(['wet-on-wet'])[0] ?? {})).not.toContain('option');
    expect(Object.keys(ways([])[0] ?? {})).not.toContain('unlessOption');
  });

  test('a stage none of whose ways is left falls out', () => {
    const blend = body([stage('prep', [way()]), stage('melt', [way({ option: 'blend' })])], {
      options: [option('blend')],
    });
    expect(keys([], blend)).toEqual(['prep']);
    expect(keys(['blend'], blend)).toEqual(['prep', 'melt']);
  });

  test('add coats as often as they are chosen, each with its flash', () => {
    const extra = [alone('flash', 10), hands('spray', 6)].map((phase) => ({ ...phase, perExtraCoat: 'coats' }));
    const of = body([stage('base', [sprayed([hands('setup', 15), ...coats(2, 6, 10), ...extra])])], {
      options: [option('coats', { most: 2 })],
    });
    const phases = (chosen: string[]) =>
      expandSheet(of, chosen)[0]?.ways[0]?.phases.map(({ kind, minutes }) => `${kind} ${minutes}`);
    const two = ['setup 15', 'spray 6', 'flash 10', 'spray 6'];
    expect(phases([])).toEqual(two);
    expect(phases(['coats'])).toEqual([...two, 'flash 10', 'spray 6']);
    expect(phases(['coats', 'coats'])).toEqual([...two, 'flash 10', 'spray 6', 'flash 10', 'spray 6']);
    expect(JSON.stringify(expandSheet(of, ['coats']))).not.toContain('perExtraCoat');
  });

  test('a second bake, and a bake repeated after the film is opened, are stages of an option', () => {
    const of = body(
      [
        stage('prime', [sprayed(coats(1, 6, 0))]),
        stage('bake', [boothBake(60, 30)]),
        stage('open-up', [way()], { option: 'again' }),
        stage('bake-again', [boothBake(60, 30)], { option: 'again' }),
      ],
      { options: [option('again', { on: true })] },
    );
    expect(keys(['again'], of)).toEqual(['prime', 'bake', 'open-up', 'bake-again']);
    expect(keys([], of)).toEqual(['prime', 'bake']);
  });

  test('leaves the sheet itself as it is', () => {
    const before = JSON.stringify(wetOnWet);
    expandSheet(wetOnWet, ['wet-on-wet', 'filler']);
    expect(JSON.stringify(wetOnWet)).toBe(before);
  });
});

test('the choices a sheet is judged by: the usual one first, every combination of few options, each change of many', () => {
  const few = { options: [option('a', { on: true }), option('b'), option('c', { most: 3 })] };
  const choices = choicesOf(few).map((choice) => [...choice].sort().join(' '));
  expect(choices[0]).toBe('a');
  expect(new Set(choices).size).toBe(12);
  expect(choices).toContain('b c c c');
  const many = { options: Array.from({ length: 12 }, (_, i) => option(`o${i}`)) };
  expect(choicesOf(many)).toHaveLength(13);
});
