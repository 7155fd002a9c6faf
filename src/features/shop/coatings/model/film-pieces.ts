import { minutesFromSheet } from '#chemistry/sheets/minutes-from-sheet.ts';
import type { CoatingSheet } from '#contracts/coatings.ts';
import type { Formats } from '#src/lib/formats.ts';
import type { PieceKind } from '#src/lib/phase-words.ts';

type Piece = { kind: PieceKind; size: number };

/** A coat is drawn as long as this; how long it takes is the painter's and the part's. */
const COAT_MINUTES = 6;

/** The film as the sheet has it at most coats: coats and flashes, then what cures it fastest, with the same in words. */
export function filmOf(
  sheet: CoatingSheet,
  { duration }: Pick<Formats, 'duration'>,
): { pieces: Piece[]; words: string } {
  const { coats, flashBetweenCoats, flashBeforeHeat, flashBeforeNext } = sheet;
  const coat: Piece = { kind: 'spray', size: COAT_MINUTES };
  const flash = (size: number): Piece[] => (size > 0 ? [{ kind: 'flash', size }] : []);
  const pieces = Array.from({ length: coats.to }, (_, i) =>
    i === 0 ? [coat] : [...flash(flashBetweenCoats), coat],
  ).flat();
  const words = [coats.to === 1 ? '1 coat' : `${coats.to} coats with ${duration(flashBetweenCoats)} between`];
  const heat = fastestHeat(sheet);
  pieces.push(...flash(heat ? flashBeforeHeat : flashBeforeNext));
  words.push(
    heat ? `${duration(flashBeforeHeat)} before heat` : `${duration(flashBeforeNext)} before the next product`,
  );
  if (heat) {
    pieces.push({ kind: 'bake', size: heat.minutes });
    words.push(`${duration(heat.minutes)} ${heat.by}`);
  }
  return { pieces, words: `${words.join(', ')}.` };
}

function fastestHeat(sheet: CoatingSheet): { minutes: number; by: string } | null {
  const bake = minutesFromSheet('bake', sheet);
  if (bake !== null)
    return { minutes: bake, by: sheet.bake?.measuredAt === 'metal' ? 'bake with its heat-up' : 'bake' };
  const lamp = minutesFromSheet('lamp-short', sheet) ?? minutesFromSheet('lamp-medium', sheet);
  return lamp === null ? null : { minutes: lamp, by: 'under the lamp' };
}
