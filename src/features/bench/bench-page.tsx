import { useQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { localDay } from '#contracts/common.ts';
import { may, useShop } from '#src/lib/session.ts';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { useTitle } from '#src/lib/use-title.ts';
import { BenchHead } from './bench-head.tsx';
import { BenchView } from './bench-view.tsx';
import { BenchToCome, StaleNote } from './bench-states.tsx';
import { benchQuery } from './data/bench-queries.ts';

/** A painter's own stages of a day; leads may look at somebody else's. Day and person are in the address. */
export function Component() {
  useTitle('Bench');
  const shop = useShop();
  const [params, setParams] = useSearchParams();
  const wanted = localDay.safeParse(params.get('day'));
  const asked = {
    day: wanted.success ? wanted.data : undefined,
    personId: (may.plan(shop.role) && params.get('person')) || undefined,
  };
  const bench = useQuery({ ...benchQuery(shop.id, asked), enabled: may.workStages(shop.role) });
  const go = (part: { day?: string | null; person?: string }) =>
    setParams((now) => {
      const next = new URLSearchParams(now);
      for (const [name, value] of Object.entries(part)) {
        if (value) next.set(name, value);
        else next.delete(name);
      }
      return next;
    });
  if (!may.workStages(shop.role))
    return <EmptyState title="The bench is for who works on parts">Your role has no bench.</EmptyState>;
  const { data, error, isPlaceholderData, dataUpdatedAt, refetch } = bench;
  return (
    <div className="mx-auto flex w-full max-w-5xl flex-col gap-4 px-4 py-4 sm:px-5">
      <BenchHead data={isPlaceholderData ? undefined : data} asked={asked} go={go} />
      {error && (
        <StaleNote
          error={error}
          since={data && !isPlaceholderData ? dataUpdatedAt : null}
          retry={() => void refetch()}
        />
      )}
      {data && !isPlaceholderData ? <BenchView data={data} arrivedAt={dataUpdatedAt} /> : !error && <BenchToCome />}
    </div>
  );
}
