import { useMemo } from 'react';
import { useFormats } from '#src/lib/session.ts';
import { instantOf } from '#src/lib/wall-clock.ts';
import { readRecurrence, type Measure, type RecurrenceForm } from './recurrence.ts';
import { nextTimes, type Times } from './recurrence-dates.ts';
import { sayRecurrence } from './recurrence-words.ts';

/** What comes of the fields: one sentence, and the next times from today on, on the shop's clock. */
export function RecurrencePreview({ value, measure }: { value: RecurrenceForm; measure: Measure }) {
  const { clock, zone, today } = useFormats();
  const from = instantOf(today(), 0, zone);
  const read = useMemo(() => readRecurrence(value, measure).value, [value, measure]);
  const times = useMemo(() => (read ? nextTimes(read, zone, from, 6) : []), [read, zone, from]);
  if (!read) return null;
  const said = sayRecurrence(read, clock);
  return (
    <div className="rounded border border-line bg-paper px-3.5 py-3" aria-live="polite">
      <p className="font-semibold">{said.charAt(0).toUpperCase() + said.slice(1)}</p>
      {times.length === 0 ? (
        <p className="mt-1 text-amber">No time of it lies ahead.</p>
      ) : (
        <ol aria-label="Next times" className="mt-2 grid gap-x-6 gap-y-0.5 text-muted sm:grid-cols-2">
          {times.map((time) => (
            <li key={time.from.toISOString()} className="figures">
              <NextTime {...time} />
            </li>
          ))}
        </ol>
      )}
    </div>
  );
}

function NextTime({ from, to }: Times) {
  const { date, span, zone } = useFormats();
  const midnight = (at: Date) =>
    new Intl.DateTimeFormat('en-GB', { timeZone: zone, hour: '2-digit', minute: '2-digit' }).format(at) === '00:00';
  if (midnight(from) && midnight(to)) {
    const last = date(to.getTime() - 1);
    return <>{last === date(from) ? last : `${date(from)} to ${last}`}</>;
  }
  return (
    <>
      {date(from)}, {span(from, to)}
    </>
  );
}
