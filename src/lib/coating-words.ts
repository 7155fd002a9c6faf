import type { CoatingKind } from '#contracts/coatings.ts';

/** What a coating is for, in the order in which they go on. */
export const coatingKindWords: Record<CoatingKind, string> = {
  promoter: 'Adhesion promoter',
  'etch-primer': 'Etch primer',
  'epoxy-primer': 'Epoxy primer',
  primer: 'Primer surfacer',
  filler: 'Spray filler',
  sealer: 'Sealer',
  base: 'Solvent basecoat',
  'waterborne-base': 'Waterborne basecoat',
  clear: 'Clear',
  'single-stage': 'Single-stage topcoat',
  other: 'Other',
};
