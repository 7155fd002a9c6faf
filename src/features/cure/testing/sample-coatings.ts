import { emptySheet, type Coating } from '#contracts/coatings.ts';

const sheet: Coating['sheet'] = {
  ...emptySheet,
  coats: { from: 2, to: 3 },
  flashBetweenCoats: 10,
  flashBeforeNext: 15,
  flashBeforeHeat: 15,
  recoatWithin: null,
  potLife: 60,
  airDry: { minutes: 180, celsius: 20 },
  bake: { minutes: 30, celsius: 60, measuredAt: 'metal' },
  lampShort: { minutes: 25, metres: 0.7 },
};

export const primerId = '01958000-0009-7000-8000-000000000001';
export const baseId = '01958000-0009-7000-8000-000000000002';

export const sampleCoatings: Coating[] = [
  { id: primerId, name: 'Grey primer', kind: 'primer', sheet },
  { id: baseId, name: 'Basecoat', kind: 'base', sheet: { ...sheet, airDry: null, bake: null, lampShort: null } },
];
