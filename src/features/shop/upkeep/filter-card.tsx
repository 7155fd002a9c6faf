import { removeFilterEntry, type Filter, type FilterEntry, type FilterStanding } from '#contracts/upkeep.ts';
import { formatDay } from '#src/lib/formats.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { Badge, type Tone } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { useSetUpWrite } from '../parts/use-set-up-write.ts';
import { sayStanding } from './model/filter-form.ts';

const tones: Record<FilterStanding['state'], Tone> = {
  good: 'moss',
  soon: 'amber',
  due: 'crimson',
  'never-changed': 'amber',
};

type FilterCardProps = {
  filter: Filter;
  placeName: string;
  /** Absent: one's role does not write here. */
  log?: ((kind: 'change' | 'pressure') => void) | undefined;
  edit?: (() => void) | undefined;
};

/** A filter, how it stands and what was noted of it. */
export function FilterCard({ filter, placeName, log, edit }: FilterCardProps) {
  const { standing } = filter;
  return (
    <section aria-label={`${filter.name}, ${placeName}`} className="card flex flex-col gap-3 p-4">
      <header className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1">
        <div className="min-w-0">
          <h3 className="font-bold">{filter.name}</h3>
          <p className="text-muted">{placeName}</p>
        </div>
        <Badge tone={tones[standing.state]} solid={standing.state === 'due'}>
          {sayStanding(standing)}
        </Badge>
      </header>
      <Facts filter={filter} />
      <div className="flex flex-wrap gap-2">
        {log && (
          <>
            <Button size="small" onClick={() => log('change')}>
              Changed
              <span className="sr-only">
                : {filter.name}, {placeName}
              </span>
            </Button>
            <Button size="small" onClick={() => log('pressure')}>
              Enter a pressure
              <span className="sr-only">
                {' '}
                of {filter.name}, {placeName}
              </span>
            </Button>
          </>
        )}
        {edit && (
          <Button size="small" look="quiet" onClick={edit}>
            Change what makes it due
            <span className="sr-only">
              : {filter.name}, {placeName}
            </span>
          </Button>
        )}
      </div>
      <Log filter={filter} />
    </section>
  );
}

function Facts({ filter }: { filter: Filter }) {
  const { standing, changeAfterHours, changeAfterDays, pascalLimit, efficiencyPercent } = filter;
  const { date, today } = useFormats();
  const limit = (value: number | null, unit: string) => (value === null ? '' : ` of ${value} ${unit}`);
  const rows: [string, string][] = [
    ['Last changed', standing.changedAt === null ? 'not on record' : date(standing.changedAt)],
    [
      'Sprayed since',
      standing.changedAt === null ? 'not counted yet' : `${standing.sprayHours} h${limit(changeAfterHours, 'h')}`,
    ],
    ...(changeAfterDays === null ? [] : [['Changed every', `${changeAfterDays} days`] satisfies [string, string]]),
    [
      'Pressure',
      standing.pascals === null
        ? `not read${limit(pascalLimit, 'Pa')}`
        : `${standing.pascals} Pa${limit(pascalLimit, 'Pa')}`,
    ],
    [
      'Due',
      standing.dueOn === null
        ? standing.changedAt === null
          ? 'told from the first change on'
          : 'no day can be told'
        : `${formatDay(standing.dueOn, 'short', today())}${changeAfterHours === null ? '' : `, at ${standing.hoursPerDay} h a day`}`,
    ],
    ...(efficiencyPercent === null ? [] : [['Efficiency', `${efficiencyPercent} %`] satisfies [string, string]]),
  ];
  return (
    <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-1">
      {rows.map(([name, value]) => (
        <div key={name} className="contents">
          <dt className="text-muted">{name}</dt>
          <dd className="figures">{value}</dd>
        </div>
      ))}
    </dl>
  );
}

function Log({ filter }: { filter: Filter }) {
  const shop = useShop();
  const remove = useSetUpWrite(removeFilterEntry);
  const mayRemove = may.plan(shop.role);
  if (filter.entries.length === 0) return <p className="text-muted">Nothing noted yet.</p>;
  return (
    <details>
      <summary className="cursor-pointer font-semibold">Log: {filter.entries.length}</summary>
      {remove.isError && <ErrorNote error={remove.error} what="The entry stays." className="mt-2" />}
      <ul className="pt-1">
        {filter.entries.map((entry) => (
          <li
            key={entry.id}
            className="flex flex-wrap items-center justify-between gap-x-3 border-t border-line py-1.5"
          >
            <Entry entry={entry} limit={filter.pascalLimit} />
            {mayRemove && (
              <Button
                size="small"
                look="quiet"
                onClick={() => remove.mutate({ params: { shopId: shop.id, filterId: filter.id, entryId: entry.id } })}
              >
                Strike out <span className="sr-only">this entry</span>
              </Button>
            )}
          </li>
        ))}
      </ul>
    </details>
  );
}

function Entry({ entry, limit }: { entry: FilterEntry; limit: number | null }) {
  const { dateTime } = useFormats();
  const isOver = entry.pascals !== null && limit !== null && entry.pascals >= limit;
  return (
    <p className="min-w-0">
      <span className="figures">{dateTime(entry.at)}</span> <b>{entry.kind === 'change' ? 'changed' : 'pressure'}</b>
      {entry.pascals !== null && (
        <span className={isOver ? 'font-semibold text-crimson' : ''}>
          {' '}
          {entry.pascals} Pa{isOver && ', over the limit'}
        </span>
      )}
      {entry.note && <>, {entry.note}</>}
      {entry.by && <span className="text-muted"> ({entry.by})</span>}
    </p>
  );
}
