import type { ClosedTime } from '../model/closed-times.ts';
import type { Drawn } from '../model/board.ts';
import type { CalendarApi } from '@fullcalendar/core';

/** What the timeline was last told, by id. */
export type Told = Map<string, Drawn | ClosedTime>;

const isDrawn = (thing: Drawn | ClosedTime): thing is Drawn => 'shape' in thing;

// Each single change is worked out against all events there are: beyond this many, once for all is quicker.
const manyChanges = 40;

/**
 * Tells the timeline what differs from what it was told before. Handing it a new list each time instead would make it
 * throw away and draw again every bar of the day for one that moved.
 */
export function syncEvents(
  api: CalendarApi,
  told: Told,
  next: readonly (Drawn | ClosedTime)[],
  movable: boolean,
): Told {
  const now: Told = new Map(next.map((thing) => [thing.id, thing]));
  const gone = [...told.keys()].filter((id) => !now.has(id));
  const changed = next.filter((thing) => !isTold(told.get(thing.id), thing));
  api.batchRendering(() => {
    if (told.size === 0 || gone.length + changed.length > manyChanges) return tellAll(api, next, movable);
    for (const id of gone) api.getEventById(id)?.remove();
    for (const thing of changed) {
      const before = told.get(thing.id);
      if (before && isMovable(before) === isMovable(thing)) change(api, before, thing);
      else {
        api.getEventById(thing.id)?.remove();
        api.addEvent(inputOf(thing, movable));
      }
    }
  });
  return now;
}

// Bars keep their object while they say the same (see model/keep-same.ts); closed times are made anew.
const isTold = (before: Drawn | ClosedTime | undefined, thing: Drawn | ClosedTime): boolean =>
  before === thing || (!isDrawn(thing) && JSON.stringify(before) === JSON.stringify(thing));

function tellAll(api: CalendarApi, things: readonly (Drawn | ClosedTime)[], movable: boolean): void {
  api.removeAllEvents();
  api.removeAllEventSources();
  api.addEventSource(things.map((thing) => inputOf(thing, movable)));
}

function inputOf(thing: Drawn | ClosedTime, movable: boolean) {
  const common = { id: thing.id, start: thing.from, end: thing.to };
  if (isDrawn(thing)) {
    const editable = movable && mayMove(thing);
    return { ...common, resourceId: thing.rowId, editable, resourceEditable: editable, extendedProps: { item: thing } };
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

// Whether an event may change rows is settled when it is made.
const isMovable = (thing: Drawn | ClosedTime): boolean => isDrawn(thing) && mayMove(thing);

function change(api: CalendarApi, before: Drawn | ClosedTime, thing: Drawn | ClosedTime): void {
  const event = api.getEventById(thing.id);
  if (!event) return;
  if (before.from !== thing.from || before.to !== thing.to) event.setDates(thing.from, thing.to);
  if (before.rowId !== thing.rowId && thing.rowId !== null) event.setResources([thing.rowId]);
  if (!isDrawn(thing)) return event.setProp('title', thing.label);
  event.setExtendedProp('item', thing);
}
