import type { CalendarOptions, EventDropArg } from '@fullcalendar/core';
import { useCallback, useRef, useEffect, type RefObject } from 'react';
import { fractionAt, type Axis } from '../model/axis.ts';
import type { Drawn } from '../model/board.ts';
import { windowOf } from '../model/window-of.ts';
import type { DayView } from '#contracts/day.ts';

type Deps = { view: DayView; axis: Axis; onDrop: (item: Drawn, start: number, placeId: string) => void };

type DragOptions = Pick<CalendarOptions, 'eventAllow' | 'eventDragStart' | 'eventDragStop' | 'eventDrop'>;

/** While a bar is dragged its window is lit across the rows; only places take it. Dropping hands it on and puts it back. */
export function useDrag(frame: RefObject<HTMLElement | null>, deps: Deps): DragOptions {
  const latest = useRef(deps);
  useEffect(() => {
    latest.current = deps;
  });
  return {
    eventAllow: useCallback<NonNullable<DragOptions['eventAllow']>>(({ resource }) => {
      const row = latest.current.view.rows.find((r) => r.id === resource?.id);
      return row?.kind === 'booth' || row?.kind === 'prep' || row?.kind === 'rack';
    }, []),
    eventDragStart: useCallback<NonNullable<DragOptions['eventDragStart']>>(
      ({ event }) => light(frame.current, itemOf(event), latest.current.axis),
      [frame],
    ),
    eventDragStop: useCallback(() => unlight(frame.current), [frame]),
    eventDrop: useCallback((info: EventDropArg) => {
      const item = itemOf(info.event);
      const start = info.event.start?.getTime();
      const placeId = info.newResource?.id ?? item?.rowId;
      // The board is drawn from our own data only: back first, then by what the move makes of them.
      info.revert();
      if (item && start !== undefined && placeId) latest.current.onDrop(item, start, placeId);
    }, []),
  };
}

const itemOf = (event: { extendedProps: Record<string, unknown> }) => event.extendedProps['item'] as Drawn | undefined;

function light(frame: HTMLElement | null, item: Drawn | undefined, axis: Axis): void {
  if (!frame || !item) return;
  const window = windowOf(item.members);
  const from = window.earliest === null ? 0 : fractionAt(axis, Date.parse(window.earliest));
  const to = window.latest === null ? 1 : fractionAt(axis, Date.parse(window.latest));
  frame.dataset['dragging'] = 'yes';
  frame.style.setProperty('--land-from', String(from));
  frame.style.setProperty('--land-to', String(Math.max(from, to)));
}

function unlight(frame: HTMLElement | null): void {
  if (frame) delete frame.dataset['dragging'];
}
