import type { PlaceUse } from '#contracts/use.ts';
import { useFormats } from '#src/lib/session.ts';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { figuresOf, scaleOf, shareText, type Figures } from './model/shares.ts';
import { PlaceBars } from './place-bars.tsx';
import { UseTable } from './use-table.tsx';

const kinds = { booth: 'Booths', prep: 'Prep stations', rack: 'Racks' } as const;
export type Kind = keyof typeof kinds;
export type Place = { place: PlaceUse; figures: Figures };
export type Group = { kind: Kind; title: string; places: Place[]; all: Figures };

type ReportProps = { places: readonly PlaceUse[]; to: string; serverTime: string };

/** Hours by what each place did: a drawing, and a table of the same figures. */
export function Report({ places, to, serverTime }: ReportProps) {
  if (places.length === 0)
    return (
      <EmptyState title="No places yet">
        Once the shop has booths, prep stations or racks, this page shows what they did hour by hour.
      </EmptyState>
    );
  const groups = (Object.keys(kinds) as Kind[]).flatMap((kind): Group[] => {
    const found = places.filter((place) => place.kind === kind);
    if (found.length === 0) return [];
    const own = found.map((place) => ({ place, figures: figuresOf([place]) }));
    return [{ kind, title: kinds[kind], places: own, all: figuresOf(found) }];
  });
  const scale = scaleOf(groups.flatMap((group) => group.places.map(({ figures }) => figures)));
  return (
    <>
      <Heads groups={groups} />
      <Sources figures={figuresOf(places)} goesOn={serverTime < to} serverTime={serverTime} />
      {figuresOf(places).bookings === 0 ? (
        <EmptyState title="Nothing was booked in this time">The open hours are in the table below.</EmptyState>
      ) : (
        <PlaceBars groups={groups} scale={scale} />
      )}
      <UseTable groups={groups} />
      <Meanings />
    </>
  );
}

const Heads = ({ groups }: { groups: readonly Group[] }) => (
  <dl className="grid grid-cols-2 gap-3 sm:grid-cols-3">
    {groups.map(({ kind, title, all, places }) => (
      <div key={kind} className="card px-4 py-3">
        <dt className="text-muted">
          {title} <span className="figures">({places.length})</span>
        </dt>
        <dd>
          <span className="figures block text-2xl font-bold">{shareText(all.share)}</span>
          <span className="text-xs text-muted">of open hours used</span>
        </dd>
      </div>
    ))}
  </dl>
);

type SourcesProps = { figures: Figures; goesOn: boolean; serverTime: string };

/** How far the figures can be trusted. */
function Sources({ figures: { bookings, recorded }, goesOn, serverTime }: SourcesProps) {
  const { dateTime } = useFormats();
  if (bookings === 0) return null;
  const share = Math.round((recorded / bookings) * 100);
  return (
    <p className="text-muted">
      <b className="figures text-ink">
        {recorded} of {bookings}
      </b>{' '}
      bookings ({share} %) have recorded times; the others count as planned.
      {goesOn && ` As of ${dateTime(serverTime)}; what lies ahead is the plan.`}
    </p>
  );
}

const Meanings = () => (
  <dl className="grid gap-x-6 gap-y-2 text-xs text-muted sm:grid-cols-2 lg:grid-cols-4">
    {meanings.map(([word, meaning]) => (
      <div key={word}>
        <dt className="inline font-semibold text-ink">{word}: </dt>
        <dd className="inline">{meaning}</dd>
      </div>
    ))}
  </dl>
);

const meanings = [
  ['Open', 'opening hours of the shop, less closures of the place.'],
  ['Used', 'time inside open hours in which something was done. A shared booth run counts once.'],
  ['Free', 'open hours less used hours.'],
  ['Held, idle', 'a part stays in the place and nothing is done to it; counts as free, though nothing else fits.'],
] as const;
