import type { Way } from '#contracts/sheets.ts';
import type { Gap, Phase, StageSeed } from './types.ts';

type From = Pick<Phase, 'source'>;
const hands = (kind: Phase['kind'], minutes: number, from: From = {}): Phase => ({
  kind,
  minutes,
  attendance: 'hands',
  ...from,
});
const onsite = (kind: Phase['kind'], minutes: number, more: Pick<Phase, 'source' | 'lamp'> = {}): Phase => ({
  kind,
  minutes,
  attendance: 'onsite',
  ...more,
});
const alone = (kind: Phase['kind'], minutes: number, from: From = {}): Phase => ({
  kind,
  minutes,
  attendance: 'none',
  ...from,
});

/** No wait before it and no limit after. */
export const free: Gap = { min: 0, max: null, settle: 0 };

const plain: Way = {
  id: 'by-hand',
  label: 'By hand',
  placeKinds: [],
  stay: false,
  skill: null,
  lampCount: 0,
  family: null,
  load: null,
  gap: free,
  split: false,
  bakeCelsius: null,
  phases: [],
};

const stage = (given: Pick<StageSeed, 'key' | 'kind' | 'title' | 'ways'> & Partial<StageSeed>): StageSeed => ({
  option: null,
  coating: null,
  ...given,
});
export const withOption = (option: string, given: StageSeed): StageSeed => ({ ...given, option });
export const unlessOption = (option: string, given: StageSeed): StageSeed => ({ ...given, unlessOption: option });

/** One stage with the ways of several, each under its own condition: the options choose among them. */
export const eitherWay = (first: StageSeed, ...others: { ways: Way[] }[]): StageSeed => ({
  ...first,
  ways: [...first.ways, ...others.flatMap(({ ways }) => ways)],
});
export const waysWith = (given: StageSeed, part: Partial<Way>): StageSeed => ({
  ...given,
  ways: given.ways.map((way) => ({ ...way, ...part })),
});

type Work = { minutes: number; skill?: string; gap?: Gap };

/** Work at a prep station, which may go on after a break or the next day. */
export const handwork = (key: string, kind: string, title: string, work: Work): StageSeed =>
  stage({
    key,
    kind,
    title,
    ways: [
      {
        ...plain,
        placeKinds: ['prep'],
        skill: work.skill ?? 'prep',
        gap: work.gap ?? free,
        split: true,
        phases: [hands('work', work.minutes)],
      },
    ],
  });

/** Coats with a flash between; the painter stays by it. */
const coats = (count: number, spray: number, flash: number): Phase[] =>
  Array.from({ length: count }, (_, i) => [
    hands('spray', spray, { source: 'coat' }),
    ...(i < count - 1 ? [hands('flash', flash, { source: 'flash-between' })] : []),
  ]).flat();

const extraCoat = (option: string, spray: number, flash: number): Phase[] =>
  [hands('flash', flash, { source: 'flash-between' }), hands('spray', spray, { source: 'coat' })].map((phase) => ({
    ...phase,
    perExtraCoat: option,
  }));

type Spraying = {
  coating: string;
  setup: number;
  coats: number;
  minutes: number;
  flash: number;
  family: 'primer' | 'colour';
  /** Where; absent: on the spot, where the stage before left it. */
  places?: Way['placeKinds'];
  gap?: Gap;
  load?: string;
  /** Option by which coats are added, each with its flash before it. */
  extra?: string;
};

export const spraying = (key: string, title: string, given: Spraying): StageSeed =>
  stage({
    key,
    kind: key,
    title,
    coating: given.coating,
    ways: [
      {
        ...plain,
        id: 'spray',
        label: given.places ? 'Sprayed' : 'Sprayed on the spot',
        placeKinds: given.places ?? [],
        stay: given.places === undefined,
        skill: 'paint',
        family: given.family,
        load: given.load ?? null,
        gap: given.gap ?? free,
        phases: [
          ...(given.setup > 0 ? [hands('setup', given.setup)] : []),
          ...coats(given.coats, given.minutes, given.flash),
          ...(given.extra === undefined ? [] : extraCoat(given.extra, given.minutes, given.flash)),
        ],
      },
    ],
  });

/** Baked in the booth where it was sprayed: purge, bake, cool-down, and nobody moves it before. */
export const boothBake = (given: { minutes: number; celsius: number; load?: string }): Way => ({
  ...plain,
  id: 'booth-bake',
  label: 'Booth bake',
  stay: true,
  family: 'colour',
  load: given.load ?? null,
  gap: { min: 10, max: 60, settle: 10, source: 'heat' },
  bakeCelsius: given.celsius,
  phases: [alone('purge', 5), onsite('bake', given.minutes, { source: 'bake' }), alone('cool', 15)],
});

/** Under one or two lamps at a prep station. `own`: minutes of the shop's, not of the data sheet. */
export const lampCure = (given: {
  minutes: number;
  celsius: number;
  lamps?: number;
  gap: Gap;
  own?: boolean;
}): Way => ({
  ...plain,
  id: 'lamp',
  label: given.lamps === 2 ? 'Two lamps' : 'Lamp',
  placeKinds: ['prep'],
  lampCount: given.lamps ?? 1,
  gap: given.gap,
  bakeCelsius: given.celsius,
  phases: [
    onsite('bake', given.minutes, { lamp: true, ...(given.own ? {} : { source: 'lamp-short' }) }),
    alone('cool', 15),
  ],
});

export const airDry = (given: { minutes: number; gap: Gap; own?: boolean }): Way => ({
  ...plain,
  id: 'air',
  label: 'Air dry',
  placeKinds: ['rack', 'prep'],
  gap: given.gap,
  phases: [alone('flash', given.minutes, given.own ? {} : { source: 'air' })],
});

export const cure = (key: string, title: string, coating: string, ways: Way[]): StageSeed =>
  stage({ key, kind: 'cure', title, coating, ways });

/** Primer: flashed off before it is moved under the lamp or left to dry. */
export const afterPrimer: Gap = { min: 15, max: 720, settle: 15, source: 'heat' };
/** Clear: dust-free before it leaves the booth. */
export const afterClear: Gap = { min: 35, max: 720, settle: 35 };

export const primerCure = (lamps = 1): StageSeed =>
  cure('primer-cure', 'Primer bake', 'primer', [
    lampCure({ minutes: 25, celsius: 60, lamps, gap: afterPrimer }),
    airDry({ minutes: 180, gap: afterPrimer }),
  ]);

/** `spot`: small enough for a lamp. */
export const clearCure = (given: { spot?: boolean; load?: string } = {}): StageSeed =>
  cure('clear-cure', 'Bake clear', 'clear', [
    boothBake({ minutes: 40, celsius: 60, ...(given.load === undefined ? {} : { load: given.load }) }),
    ...(given.spot ? [lampCure({ minutes: 20, celsius: 60, gap: afterClear })] : []),
    airDry({ minutes: 720, gap: afterClear }),
  ]);

export const polish = (minutes: number): StageSeed =>
  handwork('polish', 'polish', 'Polish', { minutes, skill: 'polish', gap: { min: 30, max: null, settle: 0 } });
export const refit = (minutes: number): StageSeed => handwork('refit', 'refit', 'Refit', { minutes, skill: 'polish' });
