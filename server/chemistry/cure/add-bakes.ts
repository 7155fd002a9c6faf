import { equivalentMinutes, type CureScale } from './equivalent-minutes.ts';
import type { Trace } from './trace.ts';

/**
 * Several bakes of one coat added up, in minutes at the reference temperature: a primer baked, left, opened up with a
 * sanding pass and baked again has the sum of its bakes. Sanding takes film away, never cure.
 *
 * The bakes are apart: what the coat gains between them at room temperature counts only where the caller passes that time as a
 * trace too.
 */
export function addBakes(bakes: readonly Trace[], scale: CureScale): number {
  return bakes.reduce((sum, bake) => sum + equivalentMinutes(bake, scale), 0);
}
