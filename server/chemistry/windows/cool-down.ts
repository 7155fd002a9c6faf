import { finite, zeroOrMore } from '#chemistry/quantity.ts';
import { wholeMilliseconds } from '#chemistry/rounding.ts';

/** Minutes after the heat is off before hands, polish or a move (15 to 30, from memory: the cautious end; editable). */
export const DEFAULT_COOL_DOWN_MINUTES = 30;

/** The first instant at which a baked part may be touched or moved. Milliseconds since 1970-01-01T00:00Z. */
export function handsFromMs(heatOffMs: number, coolDownMinutes: number = DEFAULT_COOL_DOWN_MINUTES): number {
  return finite('heatOffMs', heatOffMs) + wholeMilliseconds(zeroOrMore('coolDownMinutes', coolDownMinutes));
}
