import type { PhaseKind } from '#contracts/common.ts';
import type { Sheet, Way } from '#contracts/sheets.ts';

type PhaseNote = [kind: PhaseKind, minutes: number, attendance: 'hands' | 'none'];

export function sampleWay(id: string, label: string, phases: PhaseNote[], more: Partial<Way> = {}): Way {
  return {
    id,
    label,
    placeKinds: ['prep'],
    stay: false,
    skill: 'prep',
    lampCount: 0,
    family: null,
    load: null,
    gap: { min: 0, max: null, settle: 0 },
    split: false,
    bakeCelsius: null,
    phases: phases.map(([kind, minutes, attendance]) => ({ kind, minutes, attendance })),
    ...more,
  };
}

const hand = (minutes: number) => sampleWay('hand', 'By hand', [['work', minutes, 'hands']], { split: true });
const coats = (count: number, flash: number): PhaseNote[] =>
  Array.from({ length: count }, (_, i): PhaseNote[] => [
    ['spray', 10, 'hands'],
    ...(i < count - 1 ? [['flash', flash, 'none'] as PhaseNote] : []),
  ]).flat();
const boothBake = (min: number) =>
  sampleWay(
    'bake',
    'Booth bake',
    [
      ['purge', 5, 'none'],
      ['bake', 30, 'none'],
      ['cool', 20, 'none'],
    ],
    {
      placeKinds: ['booth'],
      stay: true,
      skill: null,
      gap: { min, max: 90, settle: 15 },
      bakeCelsius: 60,
    },
  );

export const samplePrime = sampleWay('spray', 'Two coats', [['setup', 10, 'hands'], ...coats(2, 10)], {
  placeKinds: ['booth'],
  skill: 'paint',
  gap: { min: 0, max: 480, settle: 0 },
});

/** A tailgate that is primed, blocked, painted and baked. */
export const tailgateSheet: Sheet = {
  id: '01958000-0000-7000-8000-000000000001',
  name: 'Tailgate, repaired',
  version: 3,
  versionId: '01958000-0000-7000-8000-000000000011',
  body: {
    summary: 'Steel or aluminium panel after body work: prime, block, base and clear.',
    options: [
      { key: 'filler', label: 'Filler to shape first', on: false },
      { key: 'polish', label: 'Denib and polish', on: true },
    ],
    parts: [{ name: 'Tailgate', substrate: 'steel', units: 2 }],
    stages: [
      { key: 'prep', kind: 'prep', title: 'Clean and feather', option: null, coatingId: null, ways: [hand(50)] },
      { key: 'fill', kind: 'prep', title: 'Fill and shape', option: 'filler', coatingId: null, ways: [hand(90)] },
      { key: 'prime', kind: 'prime', title: 'Prime', option: null, coatingId: null, ways: [samplePrime] },
      {
        key: 'cure',
        kind: 'cure',
        title: 'Cure primer',
        option: null,
        coatingId: null,
        ways: [
          boothBake(15),
          sampleWay(
            'lamp',
            'Cure lamp',
            [
              ['bake', 25, 'none'],
              ['cool', 20, 'none'],
            ],
            { lampCount: 1, skill: null },
          ),
          sampleWay('air', 'Air dry', [['flash', 180, 'none']], { placeKinds: ['rack'], skill: null }),
        ],
      },
      { key: 'block', kind: 'prep', title: 'Block-sand and mask', option: null, coatingId: null, ways: [hand(70)] },
      {
        key: 'colour',
        kind: 'colour',
        title: 'Base and clear',
        option: null,
        coatingId: null,
        ways: [
          sampleWay('spray', 'Three coats, two clear', [['setup', 15, 'hands'], ...coats(5, 10)], {
            placeKinds: ['booth'],
            skill: 'paint',
          }),
        ],
      },
      { key: 'bake', kind: 'bake', title: 'Bake', option: null, coatingId: null, ways: [boothBake(20)] },
      { key: 'polish', kind: 'finish', title: 'Denib and polish', option: 'polish', coatingId: null, ways: [hand(40)] },
    ],
  },
};

/** A small plastic part that goes with others. */
export const bumperSheet: Sheet = {
  id: '01958000-0000-7000-8000-000000000002',
  name: 'Bumper cover, new',
  version: 1,
  versionId: '01958000-0000-7000-8000-000000000012',
  body: {
    summary: 'Plastic cover, unprimed: promoter, sealer, base and clear at low heat.',
    options: [{ key: 'texture', label: 'Texture on the lower edge', on: false }],
    parts: [{ name: 'Bumper cover', substrate: 'pp-tpo', units: 3 }],
    stages: [
      { key: 'clean', kind: 'prep', title: 'Clean and scuff', option: null, coatingId: null, ways: [hand(35)] },
      { key: 'colour', kind: 'colour', title: 'Promoter to clear', option: null, coatingId: null, ways: [samplePrime] },
      { key: 'dry', kind: 'cure', title: 'Dry', option: null, coatingId: null, ways: [boothBake(20)] },
    ],
  },
};
