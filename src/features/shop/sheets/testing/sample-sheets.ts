import { emptySheet, type Coating, type CoatingKind, type CoatingSheet } from '#contracts/coatings.ts';
import type { SheetBody, SheetDetail, SheetGround, SheetSurvey, Way } from '#contracts/sheets.ts';

const coating = (n: number, name: string, kind: CoatingKind, sheet: Partial<CoatingSheet>): Coating => ({
  id: `01958000-0000-7000-8000-0000000000c${n}`,
  name,
  kind,
  sheet: { ...emptySheet, ...sheet },
});

export const samplePrimer = coating(1, 'Grey surfacer', 'primer', {
  coats: { from: 2, to: 3 },
  flashBetweenCoats: 10,
  flashBeforeNext: 15,
  flashBeforeHeat: 15,
  bake: { minutes: 30, celsius: 60, measuredAt: 'metal' },
  lampShort: { minutes: 25, metres: 0.7 },
});
export const sampleBase = coating(2, 'Solvent colour', 'base', {
  coats: { from: 3, to: 4 },
  flashBetweenCoats: 10,
  flashBeforeNext: 15,
  flashBeforeHeat: 30,
  recoatWithin: 1440,
});
export const sampleClear = coating(3, 'Solid clear', 'clear', {
  coats: { from: 2, to: 2 },
  flashBetweenCoats: 10,
  flashBeforeHeat: 10,
  potLife: 120,
  bake: { minutes: 30, celsius: 60, measuredAt: 'metal' },
});
export const sampleCoatings = [samplePrimer, sampleBase, sampleClear];

export const sampleGround: SheetGround = {
  skills: [
    { skill: 'paint', people: 2, trained: 2 },
    { skill: 'polish', people: 1, trained: 0 },
    { skill: 'prep', people: 4, trained: 2 },
  ],
  lamps: 2,
  places: [
    { kind: 'booth', units: 4, bakes: true, bakeLimitCelsius: 80 },
    { kind: 'prep', units: 4, bakes: false, bakeLimitCelsius: null },
    { kind: 'rack', units: 12, bakes: false, bakeLimitCelsius: null },
  ],
};

const hand: Way = {
  id: 'by-hand',
  label: 'By hand',
  placeKinds: ['prep'],
  stay: false,
  skill: 'prep',
  lampCount: 0,
  family: null,
  load: null,
  gap: { min: 0, max: null, settle: 0 },
  split: true,
  bakeCelsius: null,
  phases: [{ kind: 'work', minutes: 30, attendance: 'hands' }],
};

/** Clean, two coats of clear, a booth bake or the rack, polish as an option. */
export const sampleBody: SheetBody = {
  summary: 'A bonnet that only needs clear.',
  options: [{ key: 'polish', label: 'Polish', on: false }],
  parts: [{ name: 'Bonnet', substrate: 'steel', units: 2 }],
  stages: [
    { key: 'prep', kind: 'prep', title: 'Clean', option: null, coatingId: null, ways: [hand] },
    {
      key: 'clear',
      kind: 'clear',
      title: 'Clear',
      option: null,
      coatingId: sampleClear.id,
      ways: [
        {
          ...hand,
          id: 'spray',
          label: 'Sprayed',
          placeKinds: ['booth'],
          skill: 'paint',
          split: false,
          phases: [
            { kind: 'setup', minutes: 10, attendance: 'hands' },
            { kind: 'spray', minutes: 7, attendance: 'hands', source: 'coat' },
            { kind: 'flash', minutes: 10, attendance: 'hands', source: 'flash-between' },
            { kind: 'spray', minutes: 7, attendance: 'hands', source: 'coat' },
          ],
        },
      ],
    },
    {
      key: 'bake',
      kind: 'cure',
      title: 'Bake',
      option: null,
      coatingId: sampleClear.id,
      ways: [
        {
          ...hand,
          id: 'booth-bake',
          label: 'Booth bake',
          placeKinds: [],
          stay: true,
          skill: null,
          split: false,
          gap: { min: 10, max: 60, settle: 10, source: 'heat' },
          bakeCelsius: 60,
          phases: [
            { kind: 'purge', minutes: 5, attendance: 'none' },
            { kind: 'bake', minutes: 40, attendance: 'onsite', source: 'bake' },
            { kind: 'cool', minutes: 15, attendance: 'none' },
          ],
        },
        {
          ...hand,
          id: 'air',
          label: 'Air dry',
          placeKinds: ['rack'],
          skill: null,
          split: false,
          gap: { min: 35, max: 720, settle: 35 },
          phases: [{ kind: 'flash', minutes: 720, attendance: 'none' }],
        },
      ],
    },
    {
      key: 'polish',
      kind: 'polish',
      title: 'Polish',
      option: 'polish',
      coatingId: null,
      ways: [{ ...hand, skill: 'polish' }],
    },
  ],
};

export const sheetId = '01958000-0000-7000-8000-000000000101';
const versionId = (version: number): string => `01958000-0000-7000-8000-00000000020${version}`;

export function sampleSheet(part: Partial<SheetDetail> = {}): SheetDetail {
  const version = part.version ?? 2;
  return {
    id: sheetId,
    name: 'Bonnet, clear only',
    version,
    versionId: versionId(version),
    body: sampleBody,
    revision: version,
    retiredAt: null,
    versions: Array.from({ length: version }, (_, i) => ({
      version: version - i,
      versionId: versionId(version - i),
      at: '2026-03-10T08:00:00.000Z',
      by: 'Imke Tiedemann',
      note: version - i === 1 ? '' : `Change number ${version - i}`,
      openJobs: i,
    })),
    ...part,
  };
}

export const sampleSurvey = (part: Partial<SheetSurvey> = {}): SheetSurvey => ({
  id: sheetId,
  name: 'Bonnet, clear only',
  version: 2,
  versionId: versionId(2),
  body: sampleBody,
  revision: 2,
  retiredAt: null,
  openJobs: 3,
  savedAt: '2026-03-10T08:00:00.000Z',
  ...part,
});
