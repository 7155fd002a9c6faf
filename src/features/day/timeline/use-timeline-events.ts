import { useEffect, useRef, type RefObject } from 'react';
import type { CalendarApi } from '@fullcalendar/core';
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
  const told = useRef<{ by: CalendarApi | null; movable: boolean; things: Told }>({
    by: null,
    movable,
    things: new Map(),
  });
  useEffect(() => {
    const by = calendar.current?.getApi();
    if (!by) return;
    // A calendar made anew (or new rights) has been told nothing.
    const afresh = told.current.by !== by || told.current.movable !== movable;
    const before: Told = afresh ? new Map<string, never>() : told.current.things;
    told.current = { by, movable, things: syncEvents(by, before, [...board, ...closed], movable) };
  }, [calendar, board, closed, movable]);
}
