import { temperature } from '#chemistry/quantity.ts';

export type ReducerSpeed = 'fast' | 'standard' | 'slow' | 'very-slow';

/** Borders between reducer speeds, C. Makers' grids, rounded and partly from memory: an editable default. */
export type ReducerGrid = { fastBelowCelsius: number; slowAboveCelsius: number; verySlowAboveCelsius: number };

export const DEFAULT_REDUCER_GRID: ReducerGrid = {
  fastBelowCelsius: 18,
  slowAboveCelsius: 25,
  verySlowAboveCelsius: 32,
};

/** A suggestion for the air the part will be sprayed in; the coating's own sheet decides. */
export function suggestReducerSpeed(airCelsius: number, grid: ReducerGrid = DEFAULT_REDUCER_GRID): ReducerSpeed {
  const celsius = temperature('airCelsius', airCelsius);
  if (celsius < grid.fastBelowCelsius) return 'fast';
  if (celsius <= grid.slowAboveCelsius) return 'standard';
  return celsius <= grid.verySlowAboveCelsius ? 'slow' : 'very-slow';
}
