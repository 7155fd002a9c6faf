import { hoursWorthShowing, type Axis } from '../model/axis.ts';
import { boardOf, type Drawn } from '../model/board.ts';
import { addDays } from '#src/lib/calendar-days.ts';
import { instantOf } from '#src/lib/wall-clock.ts';
import { lanesOf } from '../model/lanes.ts';
import type { DayRow, DayView } from '#contracts/day.ts';

export type SheetRow = { row: DayRow; lanes: number; bars: { item: Drawn; lane: number }[] };
export type SheetDay = { day: string; axis: Axis; hours: number[]; rows: SheetRow[] };

const places: DayRow['kind'][] = ['booth', 'prep', 'rack'];

/** One sheet a day: the places with their bars, those that overlap in lanes below one another. */
export function sheetDays(view: DayView, days: readonly string[], zone: string): SheetDay[] {
  return days.map((day) => {
    const from = instantOf(day, 0, zone);
    const to = instantOf(addDays(day, 1), 0, zone);
    const bars = view.bars.filter((bar) => Date.parse(bar.from) < to && Date.parse(bar.to) > from);
    const spans = [...bars, ...view.open].map((span) => ({ from: Date.parse(span.from), to: Date.parse(span.to) }));
    const today = spans.filter((span) => span.from < to && span.to > from);
    const axis: Axis = { zone, days: [day], ...hoursWorthShowing(zone, today) };
    const board = boardOf({ ...view, bars }, axis).filter((item) => item.kind === 'stage');
    return {
      day,
      axis,
      hours: hoursOf(axis),
      rows: view.rows.filter((row) => places.includes(row.kind)).map(rowOf(board)),
    };
  });
}

function rowOf(board: readonly Drawn[]) {
  return (row: DayRow): SheetRow => {
    const items = board.filter((item) => item.rowId === row.id);
    const lanes = lanesOf(items);
    return {
      row,
      lanes: Math.max(1, ...lanes.map((lane) => lane + 1)),
      bars: items.map((item, i) => ({ item, lane: lanes[i] ?? 0 })),
    };
  };
}

const hoursOf = ({ fromMinute, toMinute }: Axis): number[] =>
  Array.from({ length: Math.floor((toMinute - fromMinute) / 60) }, (_, i) => fromMinute + i * 60);
