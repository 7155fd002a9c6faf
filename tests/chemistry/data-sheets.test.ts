import { describe, expect, it } from 'vitest';
import { coatingSheet, emptySheet, gapSource, phaseSource, type CoatingSheet } from '#contracts/coatings.ts';
import { dataSheetFaults } from '#chemistry/sheets/data-sheet-faults.ts';
import { energyOfSheet } from '#chemistry/sheets/energy-of-sheet.ts';
import { gapFromSheet } from '#chemistry/sheets/gap-from-sheet.ts';
import { minutesFromSheet } from '#chemistry/sheets/minutes-from-sheet.ts';
import { retimeStages } from '#chemistry/sheets/retime-stages.ts';

// Figures of a medium-solid clear, common practice: two coats, 10 min between, 30 min at 60 C metal, overnight in the air.
const clear: CoatingSheet = {
  ...emptySheet,
  coats: { from: 2, to: 2 },
  flashBetweenCoats: 10,
  flashBeforeNext: 15,
  flashBeforeHeat: 12,
  recoatWithin: 1440,
  potLife: 120,
  airDry: { minutes: 720, celsius: 20 },
  bake: { minutes: 30, celsius: 60, measuredAt: 'metal' },
  lampShort: { minutes: 20, metres: 0.7 },
  lampMedium: { minutes: 40, metres: 0.7 },
  cautions: ['Holds isocyanate.'],
};
const codes = (given: Partial<CoatingSheet>) => {
  const { wrong, doubts } = dataSheetFaults(coatingSheet.parse({ ...clear, ...given }));
  return [...wrong.map(({ code }) => `${code}!`), ...doubts.map(({ code }) => code)];
};

describe('minutes from a data sheet', () => {
  it('knows where every source of a phase stands on the sheet', () => {
    expect(phaseSource.options.map((source) => [source, minutesFromSheet(source, clear)])).toEqual([
      ['coat', null],
      ['flash-between', 10],
      ['flash-next', 15],
      ['flash-heat', 12],
      // 30 min of hot metal, 10 min until it is hot.
      ['bake', 40],
      ['lamp-short', 20],
      ['lamp-medium', 40],
      ['air', 720],
    ]);
  });
  it('adds the heat-up to metal only, and the shop’s own where it was measured', () => {
    const bake = { minutes: 30, celsius: 60, heatUp: 14 };
    expect(minutesFromSheet('bake', { ...clear, bake: { ...bake, measuredAt: 'metal' } })).toBe(44);
    expect(minutesFromSheet('bake', { ...clear, bake: { ...bake, measuredAt: 'air' } })).toBe(30);
  });
  it('says nothing where the sheet does not', () => {
    for (const source of ['bake', 'lamp-short', 'lamp-medium', 'air'] as const)
      expect(minutesFromSheet(source, emptySheet)).toBeNull();
  });
});

describe('a gap from the sheet below', () => {
  const gap = { min: 5, max: 240, settle: 5 };
  it.each([
    [undefined, { min: 5, max: 240, settle: 5 }],
    ['recoat', { min: 15, max: 1440, settle: 15 }],
    ['next', { min: 15, max: 240, settle: 15 }],
    ['heat', { min: 12, max: 240, settle: 12 }],
  ] as const)('%s', (source, expected) => {
    const given = source === undefined ? gap : { ...gap, source };
    expect(gapFromSheet(given, clear)).toEqual({ ...given, ...expected });
  });
  it('is tried with every source there is', () => {
    expect(gapSource.options).toEqual(['recoat', 'next', 'heat']);
  });
  it('never leaves an end set by hand after the window, and keeps a shorter hold of the place', () => {
    const given = { min: 15, max: 2880, settle: 4, source: 'next' as const };
    expect(gapFromSheet(given, clear)).toMatchObject({ min: 15, max: 1440, settle: 4 });
    expect(gapFromSheet(given, { ...clear, flashBeforeNext: 2 })).toMatchObject({ min: 2, settle: 2 });
  });
  it('has no end where the window has none', () => {
    const open = { ...clear, recoatWithin: null };
    expect(gapFromSheet({ ...gap, source: 'recoat' }, open).max).toBeNull();
    expect(gapFromSheet({ ...gap, source: 'next' }, open).max).toBe(240);
  });
});

describe('stages re-timed with a coating', () => {
  const way = (given: object) => ({ gap: { min: 0, max: null, settle: 0 }, bakeCelsius: null, phases: [], ...given });
  const sprayed = {
    coatingId: 'clear',
    ways: [way({ phases: [{ minutes: 7 }, { minutes: 8, source: 'flash-between' }, { minutes: 7, source: 'coat' }] })],
  };
  const baked = {
    coatingId: 'clear',
    ways: [
      way({
        gap: { min: 10, max: 60, settle: 10, source: 'heat' },
        bakeCelsius: 55,
        phases: [{ minutes: 5 }, { minutes: 35, source: 'bake' }],
      }),
      way({ phases: [{ minutes: 700, source: 'air' }] }),
    ],
  };
  const after = { coatingId: null, ways: [way({ gap: { min: 1, max: 2, settle: 0, source: 'recoat' } })] };

  it('takes what is sourced, leaves what was set by hand, and reaches the stage above it', () => {
    const found = retimeStages([{ coatingId: null, ways: [way({})] }, sprayed, baked, after], {
      id: 'clear',
      sheet: clear,
    });
    expect(found.map(({ index, differs }) => [index, differs])).toEqual([
      [1, true],
      [2, true],
      [3, true],
    ]);
    expect(found[0]?.after[0]?.phases).toEqual([
      { minutes: 7 },
      { minutes: 10, source: 'flash-between' },
      { minutes: 7, source: 'coat' },
    ]);
    expect(found[1]?.after).toMatchObject([
      { gap: { min: 12, max: 60, settle: 12 }, bakeCelsius: 60, phases: [{ minutes: 5 }, { minutes: 40 }] },
      { phases: [{ minutes: 720 }] },
    ]);
    expect(found[2]?.after[0]?.gap).toMatchObject({ min: 15, max: 1440, settle: 0 });
  });
  it('changes nothing the second time', () => {
    const once = retimeStages([sprayed, baked], { id: 'clear', sheet: clear });
    const stages = once.map(({ after: ways }) => ({ coatingId: 'clear', ways }));
    expect(retimeStages(stages, { id: 'clear', sheet: clear }).map(({ differs }) => differs)).toEqual([false, false]);
  });
  it('leaves stages of another coating alone, and the gap above that one', () => {
    const other = { ...sprayed, coatingId: 'base' };
    expect(retimeStages([other, after], { id: 'clear', sheet: clear })).toEqual([]);
    expect(retimeStages([sprayed, other, after], { id: 'clear', sheet: clear }).map(({ index }) => index)).toEqual([0]);
  });
});

describe('activation energy of a sheet', () => {
  it('is fitted to its two lines: 26.95 kJ/mol for 7 days at 22 C or 2 days at 60 C (a coatings engineer’s article)', () => {
    const lines = { airDry: { minutes: 7 * 1440, celsius: 22 }, bake: { ...bakeAt60, minutes: 2 * 1440 } };
    const energy = energyOfSheet({ ...lines, kilojoulesPerMole: null });
    expect(energy.from).toBe('fitted');
    expect(energy.kilojoulesPerMole).toBeCloseTo(26.95, 2);
    expect(energyOfSheet({ ...lines, kilojoulesPerMole: 44 })).toEqual({ kilojoulesPerMole: 44, from: 'set' });
  });
  it('is the default where one line is missing or they contradict each other', () => {
    const byDefault = { kilojoulesPerMole: 50, from: 'default' };
    expect(energyOfSheet({ ...clear, airDry: null })).toEqual(byDefault);
    expect(energyOfSheet({ ...clear, airDry: { minutes: 30, celsius: 20 } })).toEqual(byDefault);
  });
});
const bakeAt60 = { minutes: 30, celsius: 60, measuredAt: 'metal' as const };

describe('faults of a data sheet', () => {
  it('finds nothing in a sheet as practice has it', () => {
    expect(codes({})).toEqual([]);
  });
  it.each<[Partial<CoatingSheet>, string[]]>([
    [{ coats: { from: 3, to: 2 } }, ['coats-turned!']],
    [{ recoatWithin: 14 }, ['recoat-ends-before-it-begins!']],
    [{ recoatWithin: 15 }, []],
    [{ heatLimitCelsius: 59 }, ['bake-above-limit!']],
    [{ heatLimitCelsius: 60 }, []],
    [{ holds: { from: 25, to: 15 } }, ['range-turned!', 'air-dry-outside-range']],
    [{ holds: { from: 21, to: 30 } }, ['air-dry-outside-range']],
    // Four coats: the last begins after three flashes of 10 min.
    [{ coats: { from: 2, to: 4 }, potLife: 29 }, ['pot-life-shorter-than-coats']],
    [{ coats: { from: 2, to: 4 }, potLife: 30 }, []],
    [{ cautions: [] }, ['mixed-without-caution']],
    [{ cautions: [], potLife: null }, []],
    [{ airDry: null, bake: null, lampShort: null, lampMedium: null }, ['no-cure']],
    [{ airDry: { minutes: 25, celsius: 20 } }, ['hotter-not-faster']],
    // 720 to 500 min over 40 C: 7.4 kJ/mol by hand; sheets imply 23 to 47.
    [{ bake: { ...bakeAt60, minutes: 500 } }, ['activation-energy-unusually-low']],
    [{ kilojoulesPerMole: 120 }, ['activation-energy-unusually-high']],
    // 93 C: International Fire Code 2018, chapter 24.
    [{ bake: { ...bakeAt60, celsius: 94, measuredAt: 'air' } }, ['bake-above-booth-air']],
    [{ bake: { ...bakeAt60, celsius: 93, measuredAt: 'air' } }, []],
    [{ flashBeforeHeat: 9 }, ['heat-before-flashed']],
    [{ flashBeforeHeat: 9, coats: { from: 1, to: 1 } }, []],
    [{ lampMedium: { minutes: 19, metres: 0.7 } }, ['medium-wave-faster-than-short']],
    [{ lampShort: { minutes: 20, metres: 0.5 } }, ['lamp-distance-unusual']],
    [{ lampShort: { minutes: 20, metres: 1 } }, ['lamp-distance-unusual']],
  ])('%o: %o', (given, expected) => {
    expect(codes(given)).toEqual(expected);
  });
});
