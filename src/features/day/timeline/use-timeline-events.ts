import { useEffect, useRef, type RefObject } from 'react';
import type FullCalendar from '@fullcalendar/react';
import type { Drawn } from '../model/board.ts';
import type { ClosedTime } from '../model/closed-times.ts';
import { syncEvents, type Told } from './sync-events.ts';

/** Keeps the calendar library's events equal to the board, change by change. */
export function useTimelineEvents(
  calendar: RefObject<FullCalendar | null>,
  board: readonly Drawn[],
  closed: readonly ClosedTime[],
  movable: boolean,
): void {
  const told = useRef<{ by: FullCalendar | null; movable: boolean; things: Told }>({
    by: null,
    movable,
    things: new Map(),
  });
  useEffect(() => {
    const by = calendar.current;
    if (!by) return;
    // A calendar made anew (or new rights) has been told nothing.
    const afresh = told.current.by !== by || told.current.movable !== movable;
    if (afresh) by.getApi().removeAllEvents();
    const things = syncEvents(
      by.getApi(),
      afresh ? new Map<string, never>() : told.current.things,
      [...board, ...closed],
      movable,
    );
    told.current = { by, movable, things };
  }, [calendar, board, closed, movable]);
}
