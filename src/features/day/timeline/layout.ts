import type { Drawn } from '../model/board.ts';
import { lanesOf } from '../model/lanes.ts';
import type { RowGroup, TimelineRow } from './rows.ts';

/** Pixels. */
const HEADING = 26;
const CIRCUIT = 42;
const LEAST = 44;
const AIR = 5;
const barHeights = { stage: 47, stacked: 36, lamp: 31, hands: 31 } as const;

/** A bar in its row, and how far below the row's top it hangs. */
export type Hung = { item: Drawn; top: number };
export type LaidRow = {
  kind: 'row';
  key: string;
  top: number;
  height: number;
  row: TimelineRow;
  bars: readonly Hung[];
};
export type Heading = {
  kind: 'heading';
  key: string;
  top: number;
  height: number;
  group: RowGroup;
  rows: number;
  folded: boolean;
};
export type Laid = LaidRow | Heading;
export type Layout = { lines: readonly Laid[]; height: number };

const barHeight = ({ kind, rowKind }: Drawn): number =>
  rowKind === 'rack' ? barHeights.stacked : kind === 'stage' ? barHeights.stage : barHeights[kind];

/** Bars below each other where they overlap in time: on racks, and where what really happened overlaps. */
function hang(items: readonly Drawn[]): { bars: Hung[]; height: number } {
  const lanes = lanesOf(items);
  const most = items.reduce((height, item) => Math.max(height, barHeight(item)), 0);
  const bars = items.map((item, i) => ({ item, top: AIR + lanes[i]! * most }));
  return { bars, height: Math.max(LEAST, 2 * AIR + (Math.max(-1, ...lanes) + 1) * most) };
}

/** Where every row lies, group by group under its heading; rows of a folded group are left out. */
export function layOut(rows: readonly TimelineRow[], board: readonly Drawn[], folded: ReadonlySet<RowGroup>): Layout {
  const byRow = groupBy(board);
  const lines: Laid[] = [];
  let top = 0;
  let group: RowGroup | null = null;
  for (const row of rows) {
    if (row.group !== group) {
      group = row.group;
      const count = rows.filter((one) => one.group === group).length;
      lines.push({ kind: 'heading', key: group, top, height: HEADING, group, rows: count, folded: folded.has(group) });
      top += HEADING;
    }
    if (folded.has(group)) continue;
    const { bars, height } = row.kind === 'circuit' ? { bars: [], height: CIRCUIT } : hang(byRow.get(row.id) ?? []);
    lines.push({ kind: 'row', key: row.id, top, height, row, bars });
    top += height;
  }
  return { lines, height: top };
}

function groupBy(board: readonly Drawn[]): Map<string, Drawn[]> {
  const byRow = new Map<string, Drawn[]>();
  for (const item of board) {
    const list = byRow.get(item.rowId);
    if (list) list.push(item);
    else byRow.set(item.rowId, [item]);
  }
  return byRow;
}

/** The line that a height in pixels from the top falls into; null beyond the ends. */
export function lineAt({ lines, height }: Layout, y: number): Laid | null {
  if (y < 0 || y >= height) return null;
  let lo = 0;
  let hi = lines.length - 1;
  while (lo < hi) {
    const mid = (lo + hi + 1) >> 1;
    if (lines[mid]!.top <= y) lo = mid;
    else hi = mid - 1;
  }
  return lines[lo] ?? null;
}

/** The lines between two heights. */
export const linesBetween = ({ lines }: Layout, from: number, to: number): readonly Laid[] =>
  lines.filter((line) => line.top < to && line.top + line.height > from);
