import type { EventClickArg, EventInput } from '@fullcalendar/core';
import dayGridPlugin from '@fullcalendar/daygrid';
import luxonPlugin from '@fullcalendar/luxon3';
import FullCalendar from '@fullcalendar/react';
import { Fragment, useMemo } from 'react';
import { useNavigate } from 'react-router-dom';
import { addDays } from '#src/lib/calendar-days.ts';
import { formatDay } from '#src/lib/formats.ts';
import { useFormats } from '#src/lib/session.ts';
import type { Hours, Month, MonthDay, MonthEntry } from './model/month.ts';
import { kindOfEntry, nameOfEntry, sayHours } from './month-words.ts';

type MonthGridProps = {
  month: string;
  label: string;
  content: Month;
  things: Hours;
  linkOf: (entry: MonthEntry) => string | null;
  onMore: (day: string) => void;
};

/** A month in weeks. Loaded only where it is looked at, since the calendar library comes with it. */
export function MonthGrid({ month, label, content, things, linkOf, onMore }: MonthGridProps) {
  const formats = useFormats();
  const navigate = useNavigate();
  // The same list as long as nothing in it has changed: another one would be laid out from the start.
  const events = useMemo(() => content.entries.map((entry) => eventOf(entry, linkOf(entry))), [content, linkOf]);
  const byDay = new Map(content.days.map((day) => [day.day, day]));
  const byKey = new Map(content.entries.map((entry) => [entry.key, entry]));
  return (
    <FullCalendar
      key={month}
      plugins={[dayGridPlugin, luxonPlugin]}
      initialView="dayGridMonth"
      initialDate={`${month}-01`}
      timeZone={formats.zone}
      now={formats.today}
      firstDay={1}
      fixedWeekCount={false}
      showNonCurrentDates={false}
      headerToolbar={false}
      height="auto"
      events={events}
      eventDisplay="block"
      dayMaxEvents={3}
      dayHeaderFormat={{ weekday: 'short' }}
      viewDidMount={({ el }) => mendTable(el, label)}
      dayCellDidMount={({ el }) => mendCell(el)}
      dayCellClassNames={({ date }) => (byDay.get(formats.dayOf(date))?.isShut ? 'day-shut' : '')}
      dayCellContent={({ date }) => <DayHead day={byDay.get(formats.dayOf(date))} />}
      eventContent={({ event, isStart }) => {
        const entry = byKey.get(event.id);
        // What goes over into the next week begins again on a Monday, and says so only once.
        return entry && <Entry entry={entry} things={things} hasTime={isStart} />;
      }}
      eventClick={(clicked) => follow(clicked, (to) => void navigate(to))}
      moreLinkDidMount={({ el }) => mendMore(el)}
      moreLinkContent={({ num }) => `+${num} more`}
      moreLinkHint={(num) => `${num} more on this day`}
      // Its own list cannot be reached by keyboard, so ours opens. The view it is told to show is the one it shows.
      moreLinkClick={({ date, view }) => {
        onMore(formats.dayOf(date));
        return view.type;
      }}
    />
  );
}

const eventOf = (entry: MonthEntry, to: string | null): EventInput => ({
  id: entry.key,
  title: nameOfEntry(entry),
  // Whole days as days: the grid would draw a time until midnight as one that has no end.
  ...(entry.allDay
    ? { allDay: true, start: entry.firstDay, end: addDays(entry.lastDay, 1) }
    : { start: entry.from, end: entry.to }),
  classNames: ['closed-box', `closed-${entry.closure.kind}`],
  interactive: false,
  ...(to === null ? {} : { url: to }),
});

/** As a link of the router's would: the page stays, and a new tab is a new tab. */
function follow({ event, jsEvent }: EventClickArg, navigate: (to: string) => void): void {
  if (!event.url) return;
  jsEvent.preventDefault();
  if (jsEvent.ctrlKey || jsEvent.metaKey || jsEvent.shiftKey) window.open(event.url, '_blank', 'noopener');
  else navigate(event.url);
}

function DayHead({ day }: { day: MonthDay | undefined }) {
  const formats = useFormats();
  if (!day) return null;
  return (
    <>
      <span className="sr-only">
        {formatDay(day.day, 'long')}
        {day.day === formats.today() && ', today'}:
      </span>{' '}
      <b aria-hidden="true">{Number(day.day.slice(8))}</b>
      <span className="figures">
        {sayHours(day, formats).map((line) => (
          <Fragment key={line}>
            <span>{line}</span>{' '}
          </Fragment>
        ))}
      </span>
    </>
  );
}

function Entry({ entry, things, hasTime }: { entry: MonthEntry; things: Hours; hasTime: boolean }) {
  const formats = useFormats();
  return (
    <span className="closed-text">
      <b>{nameOfEntry(entry)}</b> <span>{kindOfEntry(entry, things)}</span>{' '}
      {!entry.allDay && hasTime && <span className="figures">{formats.span(entry.from, entry.to)}</span>}
    </span>
  );
}

// The library calls its table a grid, which would promise arrow keys that it does not have.
function mendTable(view: HTMLElement, label: string): void {
  const grid = view.querySelector('[role="grid"]');
  grid?.setAttribute('role', 'table');
  grid?.setAttribute('aria-label', label);
}
function mendCell(cell: HTMLElement): void {
  cell.setAttribute('role', 'cell');
  cell.querySelector('.fc-daygrid-day-number')?.removeAttribute('aria-label');
}
function mendMore(more: HTMLElement): void {
  more.setAttribute('role', 'button');
  more.setAttribute('aria-haspopup', 'dialog');
  more.removeAttribute('aria-expanded');
  more.removeAttribute('aria-controls');
}
