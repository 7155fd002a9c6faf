import luxon from '@fullcalendar/luxon3';
import FullCalendar from '@fullcalendar/react';
import resourceTimeline from '@fullcalendar/resource-timeline';
import { memo, useRef } from 'react';
import type { Drawn } from '../model/board.ts';
import { closedTimes } from '../model/closed-times.ts';
import { addDays } from '#src/lib/calendar-days.ts';
import { useBoardContext, useBoardData } from './board-context.ts';
import { eventContent, groupLabel, laneContent, rowLabel, slotLabel } from './contents.tsx';
import { exactDrag } from './exact-drag.ts';
import { rowsOf } from './rows.ts';
import { clockOf, scaleOf, type Zoom } from './scale.ts';
import { useAccessible } from './use-accessible.ts';
import { useArrows } from './use-arrows.ts';
import { useDrag } from './use-drag.ts';
import { useKeepCentre } from './use-keep-centre.ts';
import { useSame } from '../use-same.ts';
import { useNowLine } from './use-now-line.ts';
import { useTimelineEvents } from './use-timeline-events.ts';
import { useWidth } from './use-width.ts';

export type TimelineProps = {
  board: readonly Drawn[];
  people: boolean;
  zoom: Zoom;
  /** Server's clock less the browser's, milliseconds. */
  skew: number;
  movable: boolean;
  onDrop: (item: Drawn, start: number, placeId: string) => void;
  onNudge: (item: Drawn, minutes: number) => void;
};

const plugins = [resourceTimeline, exactDrag, luxon];
const views = { booths: { type: 'resourceTimeline' } };
const oneLevel = [{ hour: 'numeric' as const }];
const twoLevels = [{ weekday: 'short' as const, day: 'numeric' as const }, { hour: 'numeric' as const }];
const rowNamesWidth = 172;

/** The booth day as rows over time. Only tells the calendar library what to draw; every figure comes from `model/`. */
export const Timeline = memo(function Timeline(props: TimelineProps) {
  const { board, people, zoom, movable } = props;
  const { view, axis } = useBoardData();
  const { sayTime } = useBoardContext();
  const calendar = useRef<FullCalendar>(null);
  const frame = useRef<HTMLDivElement>(null);
  const width = useWidth(frame, calendar);
  const rows = useSame(rowsOf(view, people));
  const scale = scaleOf(axis, Math.max(320, width - rowNamesWidth), zoom);
  const closed = useSame(closedTimes(view));
  const first = axis.days[0] ?? '';
  const range = useSame({ start: first, end: addDays(axis.days.at(-1) ?? first, 1) });
  useTimelineEvents(calendar, board, closed, movable);
  useAccessible(frame);
  useNowLine(frame, axis, props.skew, sayTime);
  useKeepCentre(frame, zoom);
  const drag = useDrag(frame, { view, axis, onDrop: props.onDrop });
  const onKeyDown = useArrows(frame, board, props.onNudge);
  return (
    <div ref={frame} className="timeline" role="group" aria-label="Booth day" onKeyDown={onKeyDown}>
      <FullCalendar
        ref={calendar}
        plugins={plugins}
        // Ovenbird is free software (AGPL-3.0-or-later): the timeline is used under its GPL edition.
        schedulerLicenseKey="GPL-My-Project-Is-Open-Source"
        initialView="booths"
        views={views}
        visibleRange={range}
        timeZone={axis.zone}
        headerToolbar={false}
        height="auto"
        stickyHeaderDates
        slotMinTime={clockOf(axis.fromMinute)}
        slotMaxTime={clockOf(axis.toMinute)}
        slotDuration={clockOf(scale.slotMinutes)}
        slotLabelInterval={clockOf(Math.max(60, scale.slotMinutes))}
        slotMinWidth={zoom === 1 ? 1 : scale.slotWidth}
        snapDuration="00:05:00"
        slotLabelFormat={axis.days.length > 1 ? twoLevels : oneLevel}
        slotLabelContent={slotLabel}
        resources={rows}
        resourceOrder="order"
        resourceGroupField="group"
        resourceAreaWidth={`${rowNamesWidth}px`}
        resourceAreaHeaderContent="Place"
        resourceLabelContent={rowLabel}
        resourceGroupLabelContent={groupLabel}
        resourceLaneContent={laneContent}
        eventContent={eventContent}
        eventDurationEditable={false}
        eventResourceEditable
        eventMinWidth={1}
        eventLongPressDelay={400}
        dragRevertDuration={0}
        {...drag}
      />
    </div>
  );
});

export default Timeline;
