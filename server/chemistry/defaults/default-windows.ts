import type { Mark } from '#chemistry/finding.ts';
import type { CoatKind } from '#chemistry/windows/missed-window.ts';

/** From and to as a data sheet would print them, and how far the figure can be trusted. */
export type DefaultRange = { from: number; to: number; mark: Mark };

export type CoatDefaults = {
  coats: DefaultRange | null;
  minutesBetweenCoats: DefaultRange | null;
  /** From the last coat to what follows it: next material, or heat. */
  minutesBeforeNext: DefaultRange | null;
  /** The longest wait before the next material without sanding. */
  recoatWindowHours: DefaultRange | null;
  /** At 60 C, metal. */
  bakeMinutesAt60Celsius: DefaultRange | null;
  shortWaveLampMinutes: DefaultRange | null;
  airDryMinutes: DefaultRange | null;
};

const published = (from: number, to = from): DefaultRange => ({ from, to, mark: 'published' });
const memory = (from: number, to = from): DefaultRange => ({ from, to, mark: 'from-memory' });
const practice = (from: number, to = from): DefaultRange => ({ from, to, mark: 'common-practice' });

const NOTHING: CoatDefaults = {
  coats: null,
  minutesBetweenCoats: null,
  minutesBeforeNext: null,
  recoatWindowHours: null,
  bakeMinutesAt60Celsius: null,
  shortWaveLampMinutes: null,
  airDryMinutes: null,
};

/**
 * First values for a shop that has not typed in its data sheets yet. A shop copies and edits them; a data sheet always
 * goes before them. Published figures come from makers' sheets; the rest is memory and practice, and must be shown as such.
 */
export const DEFAULT_WINDOWS: Record<CoatKind, CoatDefaults> = {
  primer: {
    ...NOTHING,
    coats: memory(2, 3),
    minutesBetweenCoats: memory(3, 10),
    minutesBeforeNext: memory(10, 20),
    bakeMinutesAt60Celsius: published(15, 30),
    shortWaveLampMinutes: memory(10, 30),
    airDryMinutes: published(180),
  },
  sealer: { ...NOTHING, minutesBeforeNext: memory(15, 30) },
  'adhesion-promoter': { ...NOTHING, minutesBeforeNext: published(10, 15) },
  base: {
    ...NOTHING,
    coats: practice(3, 4),
    minutesBetweenCoats: memory(5, 15),
    minutesBeforeNext: memory(15, 30),
    recoatWindowHours: memory(24),
  },
  clear: {
    ...NOTHING,
    coats: memory(2),
    minutesBetweenCoats: published(3, 15),
    bakeMinutesAt60Celsius: published(20, 30),
  },
};

/** Where primer was sanded through to the substrate. */
export const PRIMER_COATS_OVER_SUBSTRATE = practice(4);
/** One thin coat of base from farther away at the end, over the full ones, to lay the metallic. */
export const BASE_DROP_COATS = practice(1);
/** Clear left to dry in the air: free of dust after so many minutes, through-cured overnight. */
export const CLEAR_DUST_FREE_MINUTES = memory(20, 40);
export const POT_LIFE_MINUTES = published(45, 240);
export const COOL_DOWN_MINUTES = memory(15, 30);
/** Half power first, so that solvent leaves. */
export const HALF_POWER_MINUTES = memory(3, 6);
