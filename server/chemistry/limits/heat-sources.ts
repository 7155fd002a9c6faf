import type { Mark } from '#chemistry/finding.ts';

export type Substrate = 'steel' | 'aluminium' | 'pp-tpo' | 'abs' | 'composite';
export type BoothRule = 'us' | 'eu';

export type SubstrateLimit = {
  celsius: number;
  /** Must lie on supports: it sags at this heat under its own weight. */
  needsSupport: boolean;
  mark: Mark;
};

/**
 * Most metal or part temperature by what the part is made of. Editable defaults. PP and TPO covers: a vehicle maker's
 * specification, 80 C and supported. ABS: kept under its softening, which begins at 68 C (published); the 60 is from memory, as
 * are the others.
 */
export const SUBSTRATE_LIMITS: Record<Substrate, SubstrateLimit> = {
  steel: { celsius: 80, needsSupport: false, mark: 'from-memory' },
  aluminium: { celsius: 80, needsSupport: false, mark: 'from-memory' },
  'pp-tpo': { celsius: 80, needsSupport: true, mark: 'published' },
  abs: { celsius: 60, needsSupport: true, mark: 'from-memory' },
  composite: { celsius: 80, needsSupport: false, mark: 'from-memory' },
};

/** A lamp's panel above this wants eyes on it whatever the part (from memory). */
export const WATCH_ABOVE_CELSIUS = 90;

/**
 * Booth air while drying: never above 93 C (200 F; International Fire Code 2018, ch. 24). Combined spray and dry booths in the
 * EU: at most 100 C (EN 16985:2018).
 */
export const BOOTH_AIR_LIMITS_CELSIUS: Record<BoothRule, number> = { us: 93, eu: 100 };

/** A vehicle with a high-voltage battery whose maker's limit nobody has recorded. From memory, on the cautious side. */
export const UNRECORDED_BATTERY_LIMIT = { celsius: 49, minutes: 45 } as const;
