import { HAIR } from '#chemistry/constants.ts';
import { zeroOrMore } from '#chemistry/quantity.ts';
import { CONTINUOUS_SHARE, type Usage } from './circuit.ts';

/** Standard ratings, amperes (from memory: NEC 240.6(A) up to 100 A; preferred values of IEC 60898-1). */
export const BREAKER_RATINGS = {
  'north-america': [15, 20, 25, 30, 35, 40, 45, 50, 60, 70, 80, 90, 100],
  europe: [6, 10, 13, 16, 20, 25, 32, 40, 50, 63, 80, 100, 125],
} as const;

export type BreakerSeries = keyof typeof BREAKER_RATINGS;

/** The rating a load asks for: its amperes, or 125 % of them for a continuous one (NEC 210.20(A)). */
export function ratingNeeded(amperes: number, usage: Usage): number {
  return zeroOrMore('amperes', amperes) / (usage === 'full' ? 1 : CONTINUOUS_SHARE);
}

/**
 * The smallest standard breaker for a load, amperes; null where none of the series is large enough. For planning only:
 * cable, demand and local code are the licensed electrician's.
 */
export function smallestBreaker(amperes: number, usage: Usage, series: BreakerSeries): number | null {
  const needed = ratingNeeded(amperes, usage);
  return BREAKER_RATINGS[series].find((rating) => rating >= needed - HAIR) ?? null;
}
