import { travellers } from './move-in-view.ts';
import type { Bar, DayView } from '#contracts/day.ts';

/** What is plainly in the way where a bar is about to land. A hint while dragging: the server knows all the rules. */
export type Hint =
  | { kind: 'taken'; by: Bar }
  | { kind: 'closed'; label: string }
  | { kind: 'too-early'; at: number }
  | { kind: 'too-late'; at: number };

/** Null where nothing is seen to be in the way. `start` in milliseconds. */
export function hintAt(view: DayView, moved: Bar, placeId: string, start: number): Hint | null {
  const earliest = moved.window.earliest === null ? -Infinity : Date.parse(moved.window.earliest);
  const latest = moved.window.latest === null ? Infinity : Date.parse(moved.window.latest);
  if (start < earliest) return { kind: 'too-early', at: earliest };
  if (start > latest) return { kind: 'too-late', at: latest };
  const by = start - Date.parse(moved.from);
  const stretch = { from: start, to: Date.parse(moved.heldTo) + by };
  return closedAt(view, placeId, stretch) ?? takenAt(view, moved, placeId, stretch);
}

type Stretch = { from: number; to: number };
const meets = (a: Stretch, from: string, to: string) => a.from < Date.parse(to) && Date.parse(from) < a.to;

function closedAt(view: DayView, placeId: string, stretch: Stretch): Hint | null {
  const row = view.rows.find((r) => r.id === placeId);
  const closed = row?.closed.find((span) => meets(stretch, span.from, span.to));
  return closed ? { kind: 'closed', label: closed.label } : null;
}

function takenAt(view: DayView, moved: Bar, placeId: string, stretch: Stretch): Hint | null {
  // A rack takes several parts at a time: counting its units is left to the server.
  if (view.rows.find((row) => row.id === placeId)?.kind === 'rack') return null;
  const going = travellers(view.bars, moved);
  const by = view.bars.find(
    (bar) => bar.placeId === placeId && !going.has(bar.id) && meets(stretch, bar.from, bar.heldTo),
  );
  return by ? { kind: 'taken', by } : null;
}
