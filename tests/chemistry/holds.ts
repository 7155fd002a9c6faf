import fc from 'fast-check';

/** Asserts a property on the same examples in every run; the seed has no meaning beyond that. */
export function holds<Arguments>(property: fc.IRawProperty<Arguments>): void {
  void fc.assert(property, { seed: 6033, numRuns: 300 });
}
