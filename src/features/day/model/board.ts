import type { Axis } from './axis.ts';
import { itemsOf, type Item } from './items.ts';
import { shapeOf, type Shape } from './shape.ts';
import type { DayView } from '#contracts/day.ts';

export type Drawn = Item & { shape: Shape };

/** Every bar with its shape, row by row and from left to right: the order in which arrow keys visit them. */
export function boardOf(view: DayView, axis: Axis): Drawn[] {
  const byRow = new Map<string, Item[]>(view.rows.map((row) => [row.id, []]));
  for (const item of itemsOf(view)) byRow.get(item.rowId)?.push(item);
  return [...byRow.values()].flatMap((row) => {
    const items = row.sort((a, b) => a.from - b.from || a.to - b.to || (a.id < b.id ? -1 : 1));
    return items.flatMap((item, i): Drawn[] => {
      const shape = shapeOf(item, { before: items[i - 1] ?? null, after: items[i + 1] ?? null }, axis);
      return shape ? [{ ...item, shape }] : [];
    });
  });
}
