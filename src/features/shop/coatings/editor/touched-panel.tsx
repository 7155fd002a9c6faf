import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { CoatingDetail } from '#contracts/coatings.ts';
import { retimeWithCoating, type TouchedByCoating } from '#contracts/retiming.ts';
import { paths } from '#src/app/paths.ts';
import { may, useShop } from '#src/lib/session.ts';
import { Badge } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { touchedQuery } from '../data/coating-queries.ts';
import { useCoatingWrite } from '../data/use-coating-write.ts';
import { useChangeWords, type TouchedStage } from './change-words.ts';

type Thing = { id: string; label: string; to: string; differs: boolean; stages: TouchedStage[] };

/** What names this coating. Where the data sheet says other times, they are taken over only for what is ticked. */
export function TouchedPanel({ coating, isDirty }: { coating: CoatingDetail; isDirty: boolean }) {
  const shop = useShop();
  const { data, error, refetch } = useQuery(touchedQuery(shop.id, coating.id, coating.version));
  return (
    <section aria-label="What it touches" className="card flex flex-col gap-3 p-4">
      <h2 className="text-base font-bold">What it touches</h2>
      {error && !data ? (
        <ErrorNote error={error} what="What it touches could not be loaded." retry={() => void refetch()} />
      ) : !data ? (
        <Skeleton className="h-24 w-full rounded" />
      ) : (
        <Touched key={`${data.version}`} coating={coating} touched={data} isDirty={isDirty} />
      )}
    </section>
  );
}

const sheetThings = ({ sheets }: TouchedByCoating): Thing[] =>
  sheets.map(({ id, name, differs, stages }) => ({ id, label: name, to: paths.sheet(id), differs, stages }));
const jobThings = ({ jobs }: TouchedByCoating): Thing[] =>
  jobs.map(({ id, number, title, differs, stages }) => ({
    id,
    label: `${number} ${title}`,
    to: paths.job(id),
    differs,
    stages,
  }));

type TouchedProps = { coating: CoatingDetail; touched: TouchedByCoating; isDirty: boolean };
function Touched({ coating, touched, isDirty }: TouchedProps) {
  const shop = useShop();
  const mayKeep = may.keepSheets(shop.role);
  const [left, setLeft] = useState<ReadonlySet<string>>(new Set());
  const [sheets, jobs] = [sheetThings(touched), jobThings(touched)];
  const retime = useCoatingWrite(retimeWithCoating);
  const chosen = (things: Thing[]) => things.filter(({ id, differs }) => differs && !left.has(id)).map(({ id }) => id);
  const [sheetIds, jobIds] = [chosen(sheets), chosen(jobs)];
  const count = sheetIds.length + jobIds.length;
  const tick = (id: string, on: boolean) =>
    setLeft((before) => new Set(on ? [...before].filter((one) => one !== id) : [...before, id]));
  const anyDiffers = [...sheets, ...jobs].some(({ differs }) => differs);
  if (sheets.length + jobs.length === 0)
    return <p className="text-muted">No process sheet names it yet, and no open job waits for it.</p>;
  return (
    <>
      <Things title="Process sheets" things={sheets} left={left} tick={mayKeep ? tick : null} />
      <Things title="Open jobs" things={jobs} left={left} tick={mayKeep ? tick : null} />
      {retime.data && <Done {...retime.data} />}
      {!anyDiffers && !retime.data && <p className="text-muted">All of them have its times.</p>}
      {retime.error !== null && <ErrorNote error={retime.error} what="Nothing was re-timed." />}
      {anyDiffers && mayKeep && (
        <div className="flex flex-col gap-1.5">
          <Button
            look="primary"
            className="self-start"
            busy={retime.isPending}
            disabled={count === 0 || isDirty}
            onClick={() =>
              retime.mutate({
                params: { shopId: shop.id, coatingId: coating.id },
                body: { version: coating.version, sheetIds, jobIds },
              })
            }
          >
            Re-time these ({count})
          </Button>
          <p className="text-xs text-muted">
            {isDirty
              ? 'Save the data sheet first.'
              : 'Process sheets get a new version; stages that have begun stay. Times set by hand stay too.'}
          </p>
        </div>
      )}
    </>
  );
}

const Done = ({ sheets, jobs, bookedStages }: { sheets: number; jobs: number; bookedStages: number }) => (
  <div role="status" className="rounded border border-moss bg-moss-soft px-3.5 py-2.5">
    <p className="font-semibold">
      Re-timed: {sheets} {sheets === 1 ? 'process sheet' : 'process sheets'}, {jobs} {jobs === 1 ? 'job' : 'jobs'}.
    </p>
    {bookedStages > 0 && (
      <p>
        {bookedStages === 1 ? 'One booked stage has' : `${bookedStages} booked stages have`} other times now than the
        posted plan. <Link to={paths.day()}>Plan again on the booth day</Link>
      </p>
    )}
  </div>
);

type ThingsProps = {
  title: string;
  things: Thing[];
  left: ReadonlySet<string>;
  tick: ((id: string, on: boolean) => void) | null;
};
function Things({ title, things, left, tick }: ThingsProps) {
  const changes = useChangeWords();
  if (things.length === 0) return null;
  return (
    <div>
      <h3 className="text-[0.8125rem] font-semibold">{title}</h3>
      <ul aria-label={title} className="mt-1 flex max-h-96 flex-col gap-1.5 overflow-y-auto" tabIndex={0}>
        {things.map(({ id, label, to, differs, stages }) => (
          <li key={id} className="flex flex-col gap-0.5">
            {differs && tick ? (
              <Checkbox label={label} checked={!left.has(id)} onChange={(event) => tick(id, event.target.checked)} />
            ) : (
              <Link to={to} className="min-h-6">
                {label}
              </Link>
            )}
            {differs && (
              <ul className="figures flex flex-col gap-0.5 pl-7 text-xs text-muted">
                {changes(stages).map(({ text, booked }) => (
                  <li key={text}>
                    {text} {booked && <Badge tone="amber">booked</Badge>}
                  </li>
                ))}
              </ul>
            )}
          </li>
        ))}
      </ul>
    </div>
  );
}
