import type { Drawn } from '../model/board.ts';

export type Direction = 'left' | 'right' | 'up' | 'down' | 'first' | 'last';

/** Which bar an arrow key leads to; null where there is none. `board` row by row, each from left to right. */
export function neighbourOf(board: readonly Drawn[], id: string, direction: Direction): Drawn | null {
  const here = board.find((item) => item.id === id);
  if (!here) return board[0] ?? null;
  const row = board.filter((item) => item.rowId === here.rowId);
  const index = row.indexOf(here);
  switch (direction) {
    case 'left':
      return row[index - 1] ?? null;
    case 'right':
      return row[index + 1] ?? null;
    case 'first':
      return row[0] ?? null;
    case 'last':
      return row.at(-1) ?? null;
    case 'up':
    case 'down':
      return nearestInRow(board, here, direction);
  }
}

/** The bar of the next row with bars that lies nearest in time. */
function nearestInRow(board: readonly Drawn[], here: Drawn, direction: 'up' | 'down'): Drawn | null {
  const rows = [...new Set(board.map((item) => item.rowId))];
  const rowId = rows[rows.indexOf(here.rowId) + (direction === 'down' ? 1 : -1)];
  const distance = (item: Drawn) => Math.abs((item.from + item.to) / 2 - (here.from + here.to) / 2);
  const candidates = board.filter((item) => item.rowId === rowId);
  return candidates.reduce<Drawn | null>(
    (best, item) => (best && distance(best) <= distance(item) ? best : item),
    null,
  );
}
