import { COOL_DOWN_MINUTES, DEFAULT_WINDOWS, type CoatDefaults } from '#chemistry/defaults/default-windows.ts';
import type { Coating, CoatingKind } from '#contracts/coatings.ts';
import type { Way } from '#contracts/sheets.ts';
import { coatPhases, phase, plainWay, sourced } from './phases.ts';

/** What was sprayed last below a stage, and whether the part still stands where that was done. */
export type Below = { coating: Coating | null; wet: boolean };

/** Defaults where no data sheet is there: common practice, to be checked against the maker's sheet. */
export function defaultsFor(kind: CoatingKind | null): CoatDefaults {
  switch (kind) {
    case 'promoter':
      return DEFAULT_WINDOWS['adhesion-promoter'];
    case 'sealer':
      return DEFAULT_WINDOWS.sealer;
    case 'base':
    case 'waterborne-base':
    case 'single-stage':
      return DEFAULT_WINDOWS.base;
    case 'clear':
      return DEFAULT_WINDOWS.clear;
    case 'etch-primer':
    case 'epoxy-primer':
    case 'primer':
    case 'filler':
    case 'other':
    case null:
      return DEFAULT_WINDOWS.primer;
  }
}

/** Bake within an hour, while it is wet (common practice). */
const BAKE_WITHIN = 60;
/** Move a wet part under a lamp or onto the rack within half a day (common practice). */
const CURE_WITHIN = 720;
/** Most sheets (published for many makers): 60 C. */
const USUAL_CELSIUS = 60;
const PURGE = 5;

const flashBeforeHeat = ({ coating }: Below): number =>
  coating ? coating.sheet.flashBeforeHeat : (defaultsFor(null).minutesBeforeNext?.from ?? 10);

const cooling = phase('cool', COOL_DOWN_MINUTES.from, 'none');

function heatGap(below: Below, within: number): Way['gap'] {
  const min = flashBeforeHeat(below);
  return { min, max: Math.max(within, min), settle: min, ...(below.coating ? { source: 'heat' as const } : {}) };
}

/** Baked in the booth where it was sprayed. */
export function boothBake(below: Below): Way {
  const usual = defaultsFor(below.coating?.kind ?? null).bakeMinutesAt60Celsius?.to ?? 30;
  return {
    ...plainWay,
    id: 'booth-bake',
    label: 'Booth bake',
    placeKinds: below.wet ? [] : ['booth'],
    stay: below.wet,
    skill: null,
    split: false,
    gap: heatGap(below, BAKE_WITHIN),
    bakeCelsius: below.coating?.sheet.bake?.celsius ?? USUAL_CELSIUS,
    phases: [
      phase('purge', PURGE, 'none'),
      { kind: 'bake', attendance: 'onsite', ...sourced('bake', below.coating, usual) },
      cooling,
    ],
  };
}

export function lampCure(below: Below): Way {
  const sheet = below.coating?.sheet;
  const source = sheet?.lampShort == null && sheet?.lampMedium != null ? 'lamp-medium' : 'lamp-short';
  const usual = defaultsFor(below.coating?.kind ?? null).shortWaveLampMinutes?.to ?? 30;
  const gap = heatGap(below, CURE_WITHIN);
  return {
    ...plainWay,
    id: 'lamp',
    label: 'Cure lamp',
    skill: null,
    split: false,
    lampCount: 1,
    gap,
    bakeCelsius: sheet?.bake?.celsius ?? USUAL_CELSIUS,
    phases: [
      ...(gap.min < PURGE ? [phase('purge', PURGE, 'none')] : []),
      { kind: 'bake', attendance: 'onsite', lamp: true, ...sourced(source, below.coating, usual) },
      cooling,
    ],
  };
}

export function airDry(below: Below): Way {
  const usual = defaultsFor(below.coating?.kind ?? null).airDryMinutes?.from ?? 720;
  return {
    ...plainWay,
    id: 'air',
    label: 'Air dry',
    placeKinds: ['rack', 'prep'],
    skill: null,
    split: false,
    gap: heatGap(below, CURE_WITHIN),
    phases: [{ kind: 'flash', attendance: 'none', ...sourced('air', below.coating, usual) }],
  };
}

export const byHand = (minutes: number, skill = 'prep'): Way => ({
  ...plainWay,
  skill,
  phases: [phase('work', minutes, 'hands')],
});

/** Every way in which the data sheet lets it cure; without one, all three. */
export function allCures(below: Below): Way[] {
  const sheet = below.coating?.sheet;
  return [
    ...(!sheet || sheet.bake ? [boothBake(below)] : []),
    ...(!sheet || sheet.lampShort || sheet.lampMedium ? [lampCure(below)] : []),
    ...(!sheet || sheet.airDry || (!sheet.bake && !sheet.lampShort && !sheet.lampMedium) ? [airDry(below)] : []),
  ];
}

/** Minutes a coat takes on a usual panel, and the set-up for it (common practice). */
const SPRAY = 7;
const SET_UP = 10;
/** The next material goes on the wet one in the same visit (common practice). */
const ON_THE_SPOT_WITHIN = 240;

/** Sprayed: on the spot while what is below is wet and within its window, else in a booth or, for primers, a prep station. */
export function sprayWay(coating: Coating | null, kind: CoatingKind, below: Below): Way {
  const defaults = defaultsFor(coating?.kind ?? kind);
  const count = coating?.sheet.coats.from ?? defaults.coats?.from ?? 1;
  const undercoat = defaults === DEFAULT_WINDOWS.primer || kind === 'promoter';
  const setUp = below.wet && kind === 'clear' ? 0 : SET_UP;
  return {
    ...plainWay,
    id: below.wet ? 'on-the-spot' : 'spray',
    label: below.wet ? 'Sprayed on the spot' : 'Sprayed',
    placeKinds: below.wet ? [] : undercoat ? ['prep', 'booth'] : ['booth'],
    stay: below.wet,
    skill: 'paint',
    split: false,
    family: undercoat || kind === 'sealer' ? 'primer' : 'colour',
    gap: below.wet ? wetGap(below, setUp) : plainWay.gap,
    phases: [
      ...(setUp > 0 ? [phase('setup', setUp, 'hands')] : []),
      ...coatPhases(count, SPRAY, coating, defaults.minutesBetweenCoats?.to ?? 10),
    ],
  };
}

/** From the flash to the end of the recoat window, less the set-up, which lies before the first coat. */
function wetGap({ coating }: Below, setUp: number): Way['gap'] {
  const min = coating?.sheet.flashBeforeNext ?? defaultsFor(null).minutesBeforeNext?.from ?? 10;
  const window = Math.min(ON_THE_SPOT_WITHIN, (coating?.sheet.recoatWithin ?? Infinity) - setUp);
  return { min, max: Math.max(min, window), settle: min, ...(coating ? { source: 'next' as const } : {}) };
}
