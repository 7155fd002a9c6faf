import { HAIR } from '#chemistry/constants.ts';
import { positive, QuantityError, zeroOrMore } from '#chemistry/quantity.ts';

export type Rectangle = { widthMetres: number; heightMetres: number };

export type LampPositions = { positions: number; across: number; down: number; turned: boolean };

/** Neighbouring positions overlap so far, since the edge of the lit field is weaker (from memory, editable). */
export const DEFAULT_OVERLAP_METRES = 0.1;

/** How many positions of a lamp cover a panel, lamp upright or turned, whichever needs fewer. Upright where equal. */
export function lampPositions(
  panel: Rectangle,
  lamp: Rectangle,
  overlapMetres: number = DEFAULT_OVERLAP_METRES,
): LampPositions {
  const upright = grid(panel, lamp, overlapMetres);
  const turned = grid(panel, { widthMetres: lamp.heightMetres, heightMetres: lamp.widthMetres }, overlapMetres);
  const useTurned = turned.across * turned.down < upright.across * upright.down;
  const best = useTurned ? turned : upright;
  return { positions: best.across * best.down, ...best, turned: useTurned };
}

function grid(panel: Rectangle, lamp: Rectangle, overlap: number): { across: number; down: number } {
  return {
    across: along(panel.widthMetres, lamp.widthMetres, overlap),
    down: along(panel.heightMetres, lamp.heightMetres, overlap),
  };
}

function along(panelMetres: number, lampMetres: number, overlapMetres: number): number {
  positive('panel metres', panelMetres);
  positive('lamp metres', lampMetres);
  if (zeroOrMore('overlapMetres', overlapMetres) >= lampMetres) {
    throw new QuantityError('overlapMetres', overlapMetres, `less than the lamp's ${lampMetres}`);
  }
  if (panelMetres <= lampMetres + HAIR) return 1;
  return 1 + Math.ceil((panelMetres - lampMetres) / (lampMetres - overlapMetres) - HAIR);
}
