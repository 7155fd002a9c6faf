import { describe, expect, test } from 'vitest';
import { emptySheet, type Coating, type CoatingKind, type CoatingSheet } from '#contracts/coatings.ts';
import { sheetBody, type SheetBody } from '#contracts/sheets.ts';
import { sheetFaults } from '#server/sheets/faults/sheet-faults.ts';
import {
  addOption,
  copyOfStage,
  moveStage,
  putStage,
  removeOption,
  removeStage,
  setPhase,
  setStage,
} from './body-edits.ts';
import { chainOf, leastMinutes } from './chain.ts';
import { changesBetween, noteOf } from './changes.ts';
import { emptyDraft, isChanged, isDraft } from './draft.ts';
import { changed, historyOf, redone, undone } from './history.ts';
import { retimedStage } from './retime.ts';
import { same } from './same.ts';
import { stageFrom, stageTemplates } from './stage-templates.ts';
import { readDegrees, readMinutes, typeDegrees, typeMinutes } from './typed.ts';

const coating = (id: string, kind: CoatingKind, sheet: Partial<CoatingSheet>): Coating => ({
  id: `0190a0a0-0000-7000-8000-0000000000${id}`,
  name: `The ${kind}`,
  kind,
  sheet: { ...emptySheet, ...sheet },
});
/** Figures as data sheets print them (see trade defaults): flashes, windows, a bake at 60 C of the metal, a short-wave lamp. */
const primer = coating('c1', 'primer', {
  coats: { from: 2, to: 3 },
  flashBetweenCoats: 10,
  flashBeforeNext: 15,
  flashBeforeHeat: 15,
  potLife: 60,
  bake: { minutes: 30, celsius: 60, measuredAt: 'metal' },
  lampShort: { minutes: 25, metres: 0.7 },
  airDry: { minutes: 180, celsius: 20 },
});
const base = coating('c2', 'base', {
  coats: { from: 3, to: 4 },
  flashBetweenCoats: 10,
  flashBeforeNext: 15,
  flashBeforeHeat: 30,
  recoatWithin: 1440,
});
const clear = coating('c3', 'clear', {
  coats: { from: 2, to: 2 },
  flashBetweenCoats: 10,
  flashBeforeHeat: 10,
  potLife: 120,
  bake: { minutes: 30, celsius: 60, measuredAt: 'metal' },
});
const coatings = [primer, base, clear];
const empty: SheetBody = {
  summary: '',
  options: [],
  parts: [{ name: 'Bumper cover', substrate: 'pp-tpo', units: 2 }],
  stages: [],
};
const build = (ids: readonly string[], shelf: readonly Coating[] = coatings): SheetBody =>
  ids.reduce((body, id) => {
    const template = stageTemplates.find((one) => one.id === id);
    if (!template) throw new Error(id);
    return putStage(stageFrom(template, body, body.stages.length, shelf), body.stages.length)(body);
  }, empty);
const bumper = build(['prep', 'prime', 'lamp-cure', 'block', 'base', 'clear', 'booth-bake', 'refit']);

describe('templates', () => {
  test('a bumper cover from prep to refit has no fault with its data sheets, but that a battery stands no 60 C', () => {
    expect(sheetBody.safeParse(bumper).success).toBe(true);
    expect(sheetFaults(bumper, coatings).map(({ code, stage }) => `${code} ${stage}`)).toEqual([
      'battery-heat lamp-cure',
      'battery-heat booth-bake',
    ]);
  });

  test('coats, flashes, windows and bakes are those of the data sheets', () => {
    const way = (key: string) => bumper.stages.find((stage) => stage.key === key)?.ways[0];
    expect(way('prime')?.phases.map(({ kind, minutes, source }) => [kind, minutes, source])).toEqual([
      ['setup', 10, undefined],
      ['spray', 7, 'coat'],
      ['flash', 10, 'flash-between'],
      ['spray', 7, 'coat'],
    ]);
    expect(way('lamp-cure')).toMatchObject({
      lampCount: 1,
      bakeCelsius: 60,
      gap: { min: 15, settle: 15, source: 'heat' },
    });
    expect(way('lamp-cure')?.phases[0]).toMatchObject({ kind: 'bake', minutes: 25, lamp: true, source: 'lamp-short' });
    expect(way('base')).toMatchObject({ stay: false, placeKinds: ['booth'] });
    expect(way('base')?.phases.filter(({ kind }) => kind === 'spray')).toHaveLength(3);
    expect(way('clear')).toMatchObject({ stay: true, gap: { min: 15, max: 240, settle: 15, source: 'next' } });
    // 30 min of metal and the usual 10 min of heat-up on top.
    expect(way('booth-bake')?.phases.map(({ kind, minutes }) => [kind, minutes])).toEqual([
      ['purge', 5],
      ['bake', 40],
      ['cool', 15],
    ]);
    expect(bumper.stages.find(({ key }) => key === 'lamp-cure')?.coatingId).toBe(primer.id);
  });

  test('without any data sheet they are common practice, and still sound', () => {
    const bare = build(['prep', 'promoter', 'prime', 'cure', 'block', 'seal', 'base', 'clear', 'cure', 'polish'], []);
    expect(sheetBody.safeParse(bare).success).toBe(true);
    expect(sheetFaults(bare, []).filter(({ severity }) => severity === 'stop')).toEqual([]);
    expect(JSON.stringify(bare)).not.toContain('source');
    expect(bare.stages.map(({ key }) => key)).toContain('cure-2');
  });

  test('a promoter with a short window keeps the set-up inside it', () => {
    const promoter = coating('c4', 'promoter', { flashBeforeNext: 10, recoatWithin: 60 });
    const body = build(['promoter', 'prime'], [promoter, primer]);
    expect(body.stages[1]?.ways[0]?.gap).toEqual({ min: 10, max: 50, settle: 10, source: 'next' });
    expect(sheetFaults(body, [promoter, primer])).toEqual([]);
  });
});

describe('edits', () => {
  test('move, copy and take out, leaving the body they were given as it was', () => {
    const before = JSON.stringify(bumper);
    const keys = (body: SheetBody) => body.stages.map(({ key }) => key).join(' ');
    expect(keys(moveStage('prep', 1)(bumper))).toMatch(/^prime prep lamp-cure/);
    expect(keys(moveStage('refit', 99)(bumper))).toBe(keys(bumper));
    expect(copyOfStage(bumper, 'base')).toMatchObject({ key: 'base-2', title: 'Base colour, again' });
    expect(keys(removeStage('mask')(bumper))).toBe(keys(bumper));
    expect(keys(removeStage('block')(bumper))).not.toContain('block');
    expect(JSON.stringify(bumper)).toBe(before);
  });

  test('an option that is taken out takes its coats along and frees what named it', () => {
    const with2 = addOption('Extra coats', { most: 2 })(addOption('Block again')(bumper));
    const extra = { kind: 'spray', minutes: 7, attendance: 'hands', perExtraCoat: 'extra-coats' } as const;
    const used = setStage('block', { option: 'block-again' })(setPhase('base', 'spray', 1, extra)(with2));
    expect(used.options.map(({ key }) => key)).toEqual(['block-again', 'extra-coats']);
    const without = removeOption('block-again')(removeOption('extra-coats')(used));
    expect(without.stages.find(({ key }) => key === 'block')?.option).toBeNull();
    expect(JSON.stringify(without)).not.toContain('extra-coats');
  });

  test('times are taken anew from a changed data sheet, the shop’s own stay', () => {
    const stage = bumper.stages.find(({ key }) => key === 'prime');
    if (!stage) throw new Error('no primer');
    const slower = { ...primer, sheet: { ...primer.sheet, flashBetweenCoats: 14 } };
    expect(retimedStage(stage, slower, null).ways[0]?.phases.map(({ minutes }) => minutes)).toEqual([10, 7, 14, 7]);
  });
});

test('undo and redo: typing in one field is one step', () => {
  const typed = ['a', 'ab', 'abc'].reduce((h, text) => changed(h, text, 'title'), historyOf(''));
  expect(typed.past).toHaveLength(1);
  const other = changed(typed, 'abc!', 'kind');
  expect(undone(other).present).toBe('abc');
  expect(undone(undone(other)).present).toBe('');
  expect(redone(undone(other)).present).toBe('abc!');
  expect(undone(historyOf('x')).present).toBe('x');
});

test('the chain goes by the quickest way, and waits at least as long as it must', () => {
  const chain = chainOf(bumper, []);
  expect(chain.map(({ key }) => key)).toEqual(bumper.stages.map(({ key }) => key));
  expect(chain[0]?.gap).toBeNull();
  const byHand = chain.reduce((sum, { minutes, gap }) => sum + minutes + (gap?.min ?? 0), 0);
  expect(leastMinutes(chain)).toBe(byHand);
});

test('what changed is told by stage and way, and a note is made of it', () => {
  const words = {
    duration: (m: number) => `${m} min`,
    temperature: (c: number) => `${c} C`,
    coating: (id: string) => id,
  };
  expect(changesBetween(bumper, bumper, words)).toEqual([]);
  const after = removeStage('refit')(
    setPhase('prime', 'spray', 0, { kind: 'setup', minutes: 20, attendance: 'hands' })(bumper),
  );
  const changes = changesBetween(bumper, after, words);
  expect(changes).toMatchObject([
    {
      where: 'Primer surfacer, Sprayed',
      what: 'Phases',
      before: expect.stringContaining('set-up 10 min'),
      after: expect.stringContaining('set-up 20 min'),
    },
    { where: 'Refit', what: 'Stage', after: null },
  ]);
  expect(noteOf(changes)).toBe('Primer surfacer, Sprayed: phases; Refit: stage taken out');
  expect(changesBetween(bumper, moveStage('block', 0)(bumper), words)[0]).toMatchObject({
    what: 'Order of the stages',
  });
});

test('figures as they are typed', () => {
  expect([45, 120, 90, 1440, 4315].map(typeMinutes)).toEqual(['45', '2 h', '90', '1 d', '71:55']);
  for (const minutes of [0, 45, 119, 120, 721, 1440, 4315, 20_160])
    expect(readMinutes(typeMinutes(minutes))).toBe(minutes);
  expect(['', 'soon', '-5', '20161', '99 d'].map(readMinutes)).toEqual([null, null, null, null, null]);
  // 120 F is 48.889 C, and is never shown or kept as more.
  expect(typeDegrees(readDegrees('120', 'F') ?? 0, 'F')).toBe('120');
  expect(typeDegrees(readDegrees('120', 'F') ?? 0, 'C')).toBe('48.888');
  expect(readDegrees('60,5', 'C')).toBe(60.5);
  expect(['', '5', 'hot', '300'].map((text) => readDegrees(text, 'C'))).toEqual([null, null, null, null]);
});

test('a draft is kept over a reload by its shape, and is unchanged in whatever order its keys come back', () => {
  const draft = emptyDraft('0190a0a0-0000-7000-8000-000000000001');
  expect(isDraft(JSON.parse(JSON.stringify({ ...draft, body: bumper })))).toBe(true);
  expect([null, {}, { ...draft, body: { stages: [{}] } }].map(isDraft)).toEqual([false, false, false]);
  expect(isChanged(draft)).toBe(false);
  expect(isChanged({ ...draft, body: bumper })).toBe(true);
  expect(same({ a: 1, b: [1, { c: 2 }] }, { b: [1, { c: 2 }], a: 1 })).toBe(true);
  expect(same({ a: 1 }, { a: 1, b: undefined })).toBe(false);
  expect(same([1, 2], [2, 1])).toBe(false);
});
