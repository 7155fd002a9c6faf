import { expect, test } from 'vitest';
import { boardOf } from '../model/board.ts';
import { barAt, day, uuid, viewOf, zone } from '../testing/sample-day.ts';
import { layOut, lineAt, linesBetween } from './layout.ts';
import { rowsOf } from './rows.ts';

const axis = { zone, days: [day], fromMinute: 420, toMinute: 1020 };
const inPlace = (n: number, start: number, place: number) =>
  barAt(n, start, [['flash', 60]], { placeId: uuid(1, place), personId: null, personName: null });
// Twice in booth 1, one after the other; twice on the rack at once.
const view = viewOf([inPlace(1, 480, 1), inPlace(2, 720, 1), inPlace(3, 540, 21), inPlace(4, 550, 21)]);
const rows = rowsOf(view, true);
const board = boardOf(view, axis);
const laid = layOut(rows, board, new Set());
const rowOf = (id: string) => laid.lines.find((line) => line.key === id);

test('rows follow each other without gaps, under the heading of their group', () => {
  let top = 0;
  for (const line of laid.lines) {
    expect(line.top).toBe(top);
    top += line.height;
  }
  expect(laid.height).toBe(top);
  expect(laid.lines[0]).toMatchObject({ kind: 'heading', group: 'Booths', folded: false });
  expect(laid.lines.filter((line) => line.kind === 'row')).toHaveLength(rows.length);
});

test('what overlaps hangs below each other, what follows stays in line', () => {
  const tops = (id: string) => {
    const row = rowOf(id);
    return row?.kind === 'row' ? row.bars.map(({ top }) => top) : [];
  };
  expect(new Set(tops(uuid(1, 1))).size).toBe(1);
  expect(new Set(tops(uuid(1, 21))).size).toBe(2);
  expect(rowOf(uuid(1, 21))!.height).toBeGreaterThan(rowOf(uuid(1, 1))!.height);
});

test('a folded group keeps its heading only', () => {
  const folded = layOut(rows, board, new Set(['Booths' as const]));
  expect(folded.lines.some((line) => line.kind === 'row' && line.row.group === 'Booths')).toBe(false);
  expect(folded.lines[0]).toMatchObject({ kind: 'heading', group: 'Booths', folded: true });
});

test('finds the line at a height, and those between two', () => {
  for (const line of laid.lines) {
    expect(lineAt(laid, line.top)).toBe(line);
    expect(lineAt(laid, line.top + line.height - 1)).toBe(line);
  }
  expect([lineAt(laid, -1), lineAt(laid, laid.height)]).toEqual([null, null]);
  const [, second, third] = laid.lines;
  expect(linesBetween(laid, second!.top, third!.top)).toEqual([second]);
});
