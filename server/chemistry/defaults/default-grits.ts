import type { Mark } from '#chemistry/finding.ts';

export type GritStep = { grits: readonly number[]; mark: Mark };
export type GritUse =
  'feather' | 'finish-for-primer' | 'open-baked-primer' | 'base-and-clear-edges' | 'melted-out-clear';

/** FEPA P grits, in the order they are used. Common practice, editable. */
export const DEFAULT_GRITS: Record<GritUse, GritStep> = {
  feather: { grits: [180], mark: 'common-practice' },
  'finish-for-primer': { grits: [400], mark: 'common-practice' },
  // A primer bake is often repeated after the film is opened, and again before it is block-sanded.
  'open-baked-primer': { grits: [400], mark: 'common-practice' },
  'base-and-clear-edges': { grits: [600, 1000], mark: 'common-practice' },
  'melted-out-clear': { grits: [3000], mark: 'common-practice' },
};
