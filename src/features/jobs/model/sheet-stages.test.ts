import { describe, expect, it } from 'vitest';
import type { SheetBody, Way } from '#contracts/sheets.ts';
import { optionsOn } from '#server/sheets/options.ts';
import { leastMinutes, stagesLeft } from './sheet-stages.ts';

const way = (given: Partial<Way>): Way => ({
  id: 'hand',
  label: 'By hand',
  placeKinds: ['prep'],
  stay: false,
  skill: 'prep',
  lampCount: 0,
  family: null,
  load: null,
  gap: { min: 0, max: null, settle: 0 },
  split: false,
  bakeCelsius: null,
  phases: [{ kind: 'work', minutes: 40, attendance: 'hands' }],
  ...given,
});
const baked = way({
  id: 'bake',
  label: 'Booth bake',
  gap: { min: 15, max: 240, settle: 0 },
  phases: [
    { kind: 'purge', minutes: 5, attendance: 'none' },
    { kind: 'bake', minutes: 30, attendance: 'none' },
    { kind: 'cool', minutes: 20, attendance: 'none' },
  ],
});
const dried = way({
  id: 'air',
  label: 'Air dry',
  gap: { min: 0, max: null, settle: 0 },
  phases: [{ kind: 'flash', minutes: 720, attendance: 'none' }],
});
const stage = { kind: 'prep', coatingId: null };
const body: SheetBody = {
  summary: '',
  options: [
    { key: 'filler', label: 'Filler', on: false },
    { key: 'polish', label: 'Polish', on: true },
  ],
  parts: [],
  stages: [
    { ...stage, key: 'prep', title: 'Prep', option: null, ways: [way({})] },
    { ...stage, key: 'fill', title: 'Fill', option: 'filler', ways: [way({})] },
    { ...stage, key: 'cure', title: 'Cure', option: null, ways: [dried, baked] },
    {
      ...stage,
      key: 'polish',
      title: 'Polish',
      option: 'polish',
      ways: [way({ gap: { min: 60, max: null, settle: 0 } })],
    },
  ],
};

describe('stages of a job made from a sheet', () => {
  it('are those without an option and those whose option is chosen', () => {
    expect(stagesLeft(body, []).map((s) => s.key)).toEqual(['prep', 'cure']);
    expect(stagesLeft(body, ['filler', 'polish']).map((s) => s.key)).toEqual(['prep', 'fill', 'cure', 'polish']);
  });

  it('show the shortest way and how long another could take', () => {
    const cure = stagesLeft(body, []).find((s) => s.key === 'cure');
    expect(cure).toMatchObject({ least: 55, most: 720, wait: 0, ways: ['Air dry', 'Booth bake'] });
    expect(cure?.phases.map((p) => p.kind)).toEqual(['purge', 'bake', 'cool']);
  });

  it('add up with the waits between them, but not before the first', () => {
    // 40 prep + 0 wait + 55 bake + 60 wait + 40 polish
    expect(leastMinutes(stagesLeft(body, ['polish']))).toBe(195);
    expect(leastMinutes([])).toBe(0);
  });

  it('start from the options that the sheet has on', () => {
    expect(optionsOn(body)).toEqual(['polish']);
  });
});
