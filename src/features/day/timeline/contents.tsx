import type { EventContentArg } from '@fullcalendar/core';
import type { ResourceLabelContentArg } from '@fullcalendar/resource';
import type { Drawn } from '../model/board.ts';
import { BarView } from './bar-view.tsx';
import { DragView } from './drag-view.tsx';
import { CircuitLane, SlotLabel } from './lane-views.tsx';

type Props = Record<string, unknown>;
const props = (thing: { extendedProps: unknown }) => thing.extendedProps as Props;

// What the calendar library asks for by function. Each stays the same function for good: a new one would make it draw
// everything again. What they need beside their argument comes by context.

export function eventContent(arg: EventContentArg) {
  const item = props(arg.event)['item'] as Drawn | undefined;
  if (!item) return arg.event.title ? <span className="closed-label">{arg.event.title}</span> : null;
  if (!arg.isMirror) return <BarView item={item} />;
  const [place] = arg.event.getResources();
  return <DragView item={item} start={arg.event.start?.getTime() ?? item.from} placeId={place?.id ?? item.rowId} />;
}

export function rowLabel({ resource }: ResourceLabelContentArg) {
  return (
    <span className="row-label">
      <b>{resource.title}</b>
      <small>{props(resource)['facts'] as string}</small>
    </span>
  );
}

export const groupLabel = ({ groupValue }: { groupValue: unknown }) => String(groupValue);

export const laneContent = ({ resource }: { resource: { id: string; extendedProps: unknown } }) =>
  props(resource)['kind'] === 'circuit' ? <CircuitLane id={resource.id} /> : null;

export const slotLabel = ({ date, level, view }: { date: Date; level?: number; view: unknown }) => (
  <SlotLabel at={date.getTime()} level={level ?? 0} key={String(view)} />
);
