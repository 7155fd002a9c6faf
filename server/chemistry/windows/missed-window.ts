export type CoatKind = 'primer' | 'sealer' | 'adhesion-promoter' | 'base' | 'clear';

/** In the order in which they are done. */
export type Remedy = readonly ('sand-again' | 'promoter-again' | 'one-more-base-coat')[];

/**
 * What a missed recoat window costs (common practice; the sheet overrules). A coat past its window no longer bites into the
 * next one: it is keyed with abrasive. Base loses its colour and metallic lay to the sanding, so one more coat of base goes
 * over it before clear. Adhesion promoter is a film too thin to sand: it goes on again.
 */
export function remedyForMissedWindow(coatBelow: CoatKind): Remedy {
  switch (coatBelow) {
    case 'primer':
    case 'sealer':
    case 'clear':
      return ['sand-again'];
    case 'base':
      return ['sand-again', 'one-more-base-coat'];
    case 'adhesion-promoter':
      return ['promoter-again'];
  }
}
