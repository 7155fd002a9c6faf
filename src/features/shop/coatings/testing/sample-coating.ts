import { emptySheet, type CoatingDetail } from '#contracts/coatings.ts';
import type { TouchedByCoating } from '#contracts/retiming.ts';

export const coatingId = '018f3a00-0000-7000-8000-000000000c01';
const id = (n: number) => `018f3a00-0000-7000-8000-000000000d0${n}`;

export const sampleCoating: CoatingDetail = {
  id: coatingId,
  name: 'Medium-solid clear',
  kind: 'clear',
  version: 3,
  retiredAt: null,
  document: null,
  usedBy: [{ id: id(1), name: 'Bumper' }],
  sheet: {
    ...emptySheet,
    coats: { from: 2, to: 2 },
    flashBetweenCoats: 10,
    flashBeforeHeat: 12,
    recoatWithin: 4320,
    potLife: 120,
    airDry: { minutes: 720, celsius: 20 },
    bake: { minutes: 30, celsius: 60, measuredAt: 'metal' },
    cautions: ['Holds isocyanate.'],
  },
};

const way = { label: 'Sprayed', minutes: { from: 26, to: 31 }, earliest: null, latest: null, bakeCelsius: null };
export const sampleTouched: TouchedByCoating = {
  version: 3,
  sheets: [
    { id: id(1), name: 'Bumper', version: 1, differs: true, stages: [{ title: 'Clear', booked: false, ways: [way] }] },
    { id: id(2), name: 'Wheels', version: 1, differs: false, stages: [] },
  ],
  jobs: [
    {
      id: id(3),
      number: 2401,
      title: 'Front bumper',
      differs: true,
      stages: [{ title: 'Clear', booked: true, ways: [way] }],
    },
    {
      id: id(4),
      number: 2402,
      title: 'Rear bumper',
      differs: true,
      stages: [{ title: 'Clear', booked: false, ways: [way] }],
    },
  ],
};
export const touchedIds = { bumper: id(1), front: id(3), rear: id(4) };
