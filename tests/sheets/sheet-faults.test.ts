import { describe, expect, test } from 'vitest';
import { sheetFaultCode, type SheetFaultCode } from '#contracts/sheet-faults.ts';
import {
  airDry,
  allFaults,
  alone,
  body,
  boothBake,
  coating,
  COATING,
  coats,
  faultsOf,
  ground,
  hands,
  lampCure,
  lit,
  option,
  seen,
  sprayed,
  stage,
  way,
} from './factories.ts';

const clear = (ways = [sprayed(coats(2, 7, 10))]) => stage('clear', ways, { coatingId: COATING });
const one = (code: SheetFaultCode, of: ReturnType<typeof body>, sheet = {}) =>
  faultsOf(of, code, { coatings: [coating(sheet)] });

describe('a bake before the flash before heat is over', () => {
  // Flash before heat 15 min: the gap and the purge count towards it.
  const after = (min: number, purge: number) =>
    one(
      'bake-before-flash',
      body([
        clear(),
        stage('bake', [
          boothBake(60, 30, { gap: { min, max: 60, settle: 0 }, phases: [alone('purge', purge), alone('bake', 30)] }),
        ]),
      ]),
      { flashBeforeHeat: 15 },
    );
  test('gap and purge count towards it', () => {
    expect(after(10, 5)).toEqual([]);
    expect(after(9, 5)).toMatchObject([
      { severity: 'stop', stage: 'bake', way: 'booth-bake', field: 'gap', names: ['the clear'], figures: [14, 15] },
    ]);
  });
  test('a flash after the last coat counts too', () => {
    const of = body([
      clear([sprayed([...coats(2, 7, 10), alone('flash', 10)])]),
      stage('bake', [boothBake(60, 30, { gap: { min: 0, max: 60, settle: 0 } })]),
    ]);
    expect(one('bake-before-flash', of, { flashBeforeHeat: 15 })).toEqual([]);
    expect(one('bake-before-flash', of, { flashBeforeHeat: 16 })[0]?.figures).toEqual([15, 16]);
  });
  test('in one and the same way', () => {
    const of = body([clear([sprayed([...coats(1, 7, 0), alone('flash', 9), alone('bake', 30)], { bakeCelsius: 60 })])]);
    expect(one('bake-before-flash', of, { flashBeforeHeat: 10 })).toMatchObject([
      { field: 'phases', figures: [9, 10] },
    ]);
  });
});

describe('coats and flashes against the data sheet', () => {
  // Clear: 3 to 15 min between coats (makers' sheets).
  test('a flash shorter than the sheet says', () => {
    const flash = (minutes: number) =>
      one('flash-short', body([clear([sprayed(coats(2, 7, minutes))])]), { flashBetweenCoats: 3 });
    expect(flash(3)).toEqual([]);
    expect(flash(2)).toMatchObject([{ severity: 'warn', way: 'spray', figures: [2, 3] }]);
  });
  test('a flash of the shop’s own beside one that is taken from the sheet', () => {
    const of = body([
      clear([sprayed([...coats(2, 7, 2), { ...alone('flash', 3), source: 'flash-between' }, hands('spray', 7)])]),
    ]);
    expect(one('flash-short', of, { flashBetweenCoats: 3 })).toMatchObject([{ figures: [2, 3] }]);
  });
  // Pot life 45 min, mixed 10:00: a coat begun 10:44 is fine, 10:46 refused.
  test('pot life: the last coat may still begin 44 min after mixing, not 46', () => {
    const begun = (minutes: number) =>
      one('pot-life', body([clear([sprayed([hands('setup', 20), ...coats(2, 10, minutes - 10)])])]), { potLife: 45 });
    expect(begun(44)).toEqual([]);
    expect(begun(45)).toEqual([]);
    expect(begun(46)).toMatchObject([{ severity: 'warn', figures: [46, 45] }]);
  });
  test('the number of coats, extra ones included, with the option it takes', () => {
    const extra = [alone('flash', 10), hands('spray', 7)].map((phase) => ({ ...phase, perExtraCoat: 'coats' }));
    const of = body([clear([sprayed([...coats(2, 7, 10), ...extra])])], { options: [option('coats', { most: 2 })] });
    expect(one('coats-off-sheet', of, { coats: { from: 2, to: 2 } })).toMatchObject([
      { figures: [3, 2, 2], withOptions: ['coats'], withoutOptions: [] },
    ]);
    expect(one('coats-off-sheet', of, { coats: { from: 2, to: 4 } })).toEqual([]);
  });
  test('minutes that say they come from the sheet and no longer agree with it', () => {
    const of = body([
      clear([sprayed([hands('spray', 7), { ...alone('flash', 8), source: 'flash-between' }, hands('spray', 7)])]),
    ]);
    expect(one('sheet-differs', of, { flashBetweenCoats: 10 })).toMatchObject([{ figures: [8, 10] }]);
    expect(one('sheet-differs', of, { flashBetweenCoats: 8 })).toEqual([]);
  });
});

describe('windows', () => {
  // Sealer: minimum 15 min, maximum 72 h; Thursday 09:00 is the last unsanded minute after Monday 09:00.
  const base = (gap: { min: number; max: number | null; settle: number }, setup: number) =>
    body([
      clear([sprayed(coats(1, 10, 0))]),
      stage('base', [sprayed([hands('setup', setup), hands('spray', 6)], { gap })]),
    ]);
  const sealer = { flashBeforeNext: 15, recoatWithin: 72 * 60 };
  test('the next coat no sooner than the sheet allows, its set-up counted', () => {
    expect(one('recoat-early', base({ min: 10, max: 4300, settle: 0 }, 5), sealer)).toEqual([]);
    expect(one('recoat-early', base({ min: 9, max: 4300, settle: 0 }, 5), sealer)).toMatchObject([
      { severity: 'warn', figures: [14, 15] },
    ]);
  });
  test('the first coat within the recoat window, not only its set-up', () => {
    expect(one('past-recoat', base({ min: 15, max: 4315, settle: 0 }, 5), sealer)).toEqual([]);
    expect(one('past-recoat', base({ min: 15, max: 4320, settle: 0 }, 5), sealer)).toMatchObject([
      { figures: [4325, 4320] },
    ]);
    expect(one('no-window', base({ min: 15, max: null, settle: 0 }, 5), sealer)).toMatchObject([{ figures: [4320] }]);
  });
  test.each([
    [{ min: 20, max: 10, settle: 0 }, [10, 20]],
    [{ min: 0, max: 10, settle: 15 }, [10, 15]],
  ])('that can never be met: %j', (gap, figures) => {
    expect(one('window-closed', body([stage('prep', [way()]), stage('next', [way({ gap })])]))).toMatchObject([
      { severity: 'stop', stage: 'next', field: 'gap', figures },
    ]);
  });
  test('heat without a purge phase needs the 3 min of purge inside its window (29 CFR 1910.107(j)(4))', () => {
    const lamp = lampCure(60, 20, { gap: { min: 0, max: 2, settle: 0 } });
    expect(one('window-closed', body([clear(), stage('cure', [lamp])]))[0]?.figures).toEqual([2, 3]);
    expect(one('no-purge', body([clear(), stage('cure', [lamp])]))).toMatchObject([
      { severity: 'stop', figures: [0, 3] },
    ]);
  });
});

describe('purge before heat: at least 3 min (International Fire Code 2018, ch. 24)', () => {
  const cured = (purge: number) =>
    one('no-purge', body([clear(), stage('cure', [lampCure(60, 20, { phases: [alone('purge', purge), lit(20)] })])]));
  test('a shorter purge phase is said, and stretched when it is planned', () => {
    expect(cured(3)).toEqual([]);
    expect(cured(2)).toMatchObject([{ severity: 'warn', field: 'phases', figures: [2, 3] }]);
  });
  test('a wait after the coat does as well', () => {
    expect(one('no-purge', body([clear(), stage('cure', [lampCure(60, 20)])]))).toEqual([]);
  });
  test('spray and heat without anything between them are refused', () => {
    const of = body([clear([sprayed([hands('spray', 7), alone('bake', 30)], { bakeCelsius: 60 })])]);
    expect(one('no-purge', of)).toMatchObject([{ severity: 'stop', figures: [0, 3] }]);
  });
});

describe('heat limits', () => {
  const baked = (celsius: number, substrate: 'steel' | 'pp-tpo' | 'abs', more = [airDry()]) =>
    body([clear(), stage('bake', [boothBake(celsius, 30), ...more])], {
      parts: [{ name: 'Part', substrate, units: 1 }],
    });
  // PP and TPO covers at most 80 C (a vehicle maker's specification); ABS softens from 68 C (published).
  test('PP and TPO: 80 C and no more', () => {
    expect(one('above-part', baked(80, 'pp-tpo'))).toEqual([]);
    expect(one('above-part', baked(80.5, 'pp-tpo'))).toMatchObject([
      { severity: 'warn', names: ['pp-tpo'], figures: [80.5, 80] },
    ]);
  });
  test('ABS stays below the 68 C at which it softens', () => {
    expect(one('above-part', baked(68, 'abs'))).toMatchObject([{ names: ['abs'], figures: [68, 60] }]);
    expect(one('above-part', baked(60, 'abs'))).toEqual([]);
  });
  test('of several parts the weakest counts; where no way is left the sheet is stopped', () => {
    const of = {
      ...baked(70, 'steel', []),
      parts: (['steel', 'abs'] as const).map((substrate) => ({ name: 'P', substrate, units: 1 })),
    };
    expect(one('above-part', of)).toMatchObject([{ severity: 'stop', names: ['abs'], figures: [70, 60] }]);
  });
  test('the film has a limit of its own by its data sheet', () => {
    expect(one('above-film', baked(60, 'steel'), { heatLimitCelsius: 55 })).toMatchObject([
      { names: ['the clear'], figures: [60, 55] },
    ]);
  });
  // Booth air at most 93 C (200 F; International Fire Code 2018, ch. 24).
  test('booth air: 93 C, or what the hottest booth allows', () => {
    expect(one('above-booth', baked(93, 'steel'))).toEqual([]);
    expect(one('above-booth', baked(94, 'steel', []))).toMatchObject([{ severity: 'stop', figures: [94, 93] }]);
    const cool = ground({ places: [{ kind: 'booth', units: 4, bakes: true, bakeLimitCelsius: 70 }] });
    expect(faultsOf(baked(75, 'steel'), 'above-booth', { ground: cool })).toMatchObject([
      { severity: 'warn', figures: [75, 70] },
    ]);
  });
  // Nothing recorded: 49 C and 45 min over all bakes. Said only where such a vehicle has no way left.
  test('a battery on board: only where no way is cool enough, and for the minutes of all bakes together', () => {
    expect(one('battery-heat', baked(60, 'steel'))).toEqual([]);
    expect(one('battery-heat', baked(60, 'steel', []))).toMatchObject([{ severity: 'warn', figures: [60, 49, 45] }]);
    expect(one('battery-heat', baked(49, 'steel', []))).toEqual([]);
    const twice = (minutes: number) =>
      body([clear(), stage('a', [boothBake(49, minutes)]), stage('b', [way()]), stage('c', [lampCure(45, 20)])]);
    expect(one('battery-minutes', twice(25))).toEqual([]);
    expect(one('battery-minutes', twice(26))).toMatchObject([{ stage: 'c', figures: [46, 45] }]);
  });
  test('heat without a temperature', () => {
    const of = body([clear(), stage('cure', [{ ...lampCure(60, 20), bakeCelsius: null }])]);
    expect(one('heat-no-temperature', of)).toMatchObject([{ severity: 'stop', stage: 'cure', way: 'lamp' }]);
  });
});

describe('who and where', () => {
  const alonely = (ways: ReturnType<typeof way>[]) => body([stage('only', ways)]);
  test.each<[SheetFaultCode, string, ReturnType<typeof way>]>([
    ['no-place', 'stop', way({ placeKinds: [] })],
    ['spray-on-rack', 'stop', sprayed(coats(1, 5, 0), { placeKinds: ['rack'] })],
    ['stay-first', 'stop', way({ stay: true, placeKinds: [] })],
    ['lamp-no-lamps', 'stop', lampCure(60, 20, { lampCount: 0 })],
    ['lamps-never-lit', 'warn', way({ lampCount: 1 })],
    ['hands-no-skill', 'warn', way({ skill: null })],
  ])('%s', (code, severity, of) => {
    expect(one(code, alonely([of]))).toMatchObject([{ severity, stage: 'only', way: of.id }]);
    expect(one(code, alonely([way()]))).toEqual([]);
  });
  test('skills, lamps and places the shop lacks', () => {
    const of = alonely([
      way({ skill: 'glass', lampCount: 2, placeKinds: ['booth'] }),
      sprayed(coats(1, 5, 0), { skill: 'prep', placeKinds: ['prep'] }),
    ]);
    const found = (code: SheetFaultCode) => faultsOf(of, code, { ground: ground() });
    expect(found('skill-nobody')).toMatchObject([
      { names: ['glass'], figures: [0] },
      // Two people prepare, none of them is trained to spray (40 CFR 63.11173).
      { names: ['prep'], figures: [2] },
    ]);
    expect(found('lamps-too-few')).toMatchObject([{ figures: [2, 1] }]);
    expect(found('place-kind-missing')).toMatchObject([{ names: ['booth'] }]);
    expect(allFaults(of).map(({ code }) => code)).not.toContain('skill-nobody');
  });
});

describe('options', () => {
  test('keys that name nothing or are there twice', () => {
    const of = body(
      [
        stage('a', [way(), way()], { option: 'gone' }),
        stage('a', [way({ unlessOption: 'lost', phases: [{ ...hands('work', 5), perExtraCoat: 'more' }] })]),
      ],
      { options: [option('x'), option('x')] },
    );
    const codes = allFaults(of).map(({ code, names }) => `${code} ${names.join()}`);
    for (const expected of [
      'option-unknown gone',
      'option-unknown lost',
      'option-unknown more',
      'option-twice x',
      'stage-twice a',
      'way-twice by-hand',
    ])
      expect(codes).toContain(expected);
  });
  test('a bake that stays where a stage was that is only there with an option', () => {
    const of = body(
      [
        stage('block', [way()], { title: 'Block-sand' }),
        stage('clear', [sprayed(coats(1, 5, 0))], { option: 'clear' }),
        stage('bake', [boothBake(60, 30)]),
      ],
      { options: [option('clear', { on: true, label: 'Clear' })] },
    );
    expect(one('stay-elsewhere', of)).toMatchObject([
      { severity: 'warn', stage: 'bake', names: ['Block-sand'], withOptions: [], withoutOptions: ['Clear'] },
    ]);
    const first = body(of.stages.slice(1), { options: of.options });
    expect(one('stay-first', first)).toMatchObject([{ severity: 'stop', withoutOptions: ['Clear'] }]);
  });
  test('a stage whose every way belongs to options, and a sheet that is empty without them', () => {
    const of = body([stage('melt', [way({ option: 'blend' })])], { options: [option('blend')] });
    expect(one('no-way-left', of)).toMatchObject([{ severity: 'stop', stage: 'melt' }]);
    expect(one('no-stage-left', of)).toMatchObject([{ severity: 'stop', stage: null }]);
  });
  test('a coating that is not among the data sheets', () => {
    expect(faultsOf(body([clear()]), 'coating-unknown')).toMatchObject([{ severity: 'stop', stage: 'clear' }]);
  });
});

test('a sound sheet has no fault, and every code has a case above', () => {
  const sound = body([
    stage('prep', [way()]),
    clear([sprayed(coats(2, 7, 10))]),
    stage('bake', [boothBake(60, 30), airDry()]),
    stage('refit', [way()]),
  ]);
  const sheet = coating({ flashBetweenCoats: 10, flashBeforeHeat: 10, potLife: 120, heatLimitCelsius: 80 });
  expect(allFaults(sound, { coatings: [sheet] })).toEqual([]);
  expect([...seen].sort()).toEqual([...sheetFaultCode.options].sort());
});
