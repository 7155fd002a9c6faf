import type { Bar, DayView } from '#contracts/day.ts';
import type { Formats } from '#src/lib/formats.ts';

type Props = { bar: Bar; view: DayView; formats: Formats };

/** Who, where, when and until when, each with its name. */
export function StageFacts({ bar, view, formats }: Props) {
  const name = (id: string) => view.rows.find((row) => row.id === id)?.name ?? 'a place that is gone';
  const facts: [string, string | null][] = [
    ['Parts', bar.partNames],
    ['When', `${formats.date(bar.from)}, ${formats.span(bar.from, bar.to)}`],
    ['Where', name(bar.placeId)],
    ['Place held until', bar.heldTo === bar.to ? null : formats.time(bar.heldTo)],
    ['Who', bar.personName ?? (bar.needsHands ? 'nobody yet' : 'needs no hands')],
    ['Way', bar.wayLabel],
    ['Lamps', bar.lampIds.length === 0 ? null : bar.lampIds.map(name).join(', ')],
    ['Promise', bar.promiseAt === null ? 'none given' : formats.dateTime(bar.promiseAt)],
    ['Posted plan', postedWords(bar, name, formats)],
  ];
  return (
    <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-1">
      {facts.map(([term, words]) =>
        words === null ? null : (
          <div key={term} className="contents">
            <dt className="text-muted">{term}</dt>
            <dd className="figures min-w-0">{words}</dd>
          </div>
        ),
      )}
    </dl>
  );
}

function postedWords(bar: Bar, name: (id: string) => string, formats: Formats): string | null {
  if (bar.added) return 'not in it yet';
  if (!bar.posted) return null;
  const who = bar.posted.personId === null ? '' : `, ${name(bar.posted.personId)}`;
  return `${formats.dateTime(bar.posted.from)}, ${name(bar.posted.placeId)}${who}`;
}
