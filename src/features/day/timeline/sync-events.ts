import type { ClosedTime } from '../model/closed-times.ts';
import type { Drawn } from '../model/board.ts';
import type { CalendarApi } from '@fullcalendar/core';

/** What the timeline was last told, by id. */
export type Told = Map<string, Drawn | ClosedTime>;

const isDrawn = (thing: Drawn | ClosedTime): thing is Drawn => 'shape' in thing;

/**
 * Tells the timeline only what differs from what it was told before. Handing it a new list instead would make it throw
 * away and draw again every bar of the day for one that moved.
 */
export function syncEvents(
  api: CalendarApi,
  told: Told,
  next: readonly (Drawn | ClosedTime)[],
  movable: boolean,
): Told {
  const now: Told = new Map(next.map((thing) => [thing.id, thing]));
  api.batchRendering(() => {
    for (const id of told.keys()) if (!now.has(id)) api.getEventById(id)?.remove();
    for (const thing of next) {
      const before = told.get(thing.id);
      if (!before) api.addEvent(inputOf(thing, movable));
      else if (before !== thing) change(api, before, thing, movable);
    }
  });
  return now;
}

function inputOf(thing: Drawn | ClosedTime, movable: boolean) {
  const common = { id: thing.id, start: thing.from, end: thing.to };
  if (isDrawn(thing)) {
    const editable = movable && mayMove(thing);
    return { ...common, resourceId: thing.rowId, editable, extendedProps: { item: thing } };
  }
  const where = thing.rowId === null ? {} : { resourceId: thing.rowId };
  return {
    ...common,
    ...where,
    display: 'background',
    classNames: ['closed', `closed-${thing.kind}`],
    title: thing.label,
  };
}

/** Lamps and hands follow their stage; what has begun is history. */
export const mayMove = (item: Drawn): boolean =>
  item.kind === 'stage' && item.members.every((bar) => bar.state === 'planned');

function change(api: CalendarApi, before: Drawn | ClosedTime, thing: Drawn | ClosedTime, movable: boolean): void {
  const event = api.getEventById(thing.id);
  if (!event) return;
  if (before.from !== thing.from || before.to !== thing.to) event.setDates(thing.from, thing.to);
  if (before.rowId !== thing.rowId && thing.rowId !== null) event.setResources([thing.rowId]);
  if (!isDrawn(thing)) return event.setProp('title', thing.label);
  event.setExtendedProp('item', thing);
  event.setProp('editable', movable && mayMove(thing));
}
