import { useQuery } from '@tanstack/react-query';
import { ChevronLeft, ChevronRight, Printer } from 'lucide-react';
import { useSearchParams } from 'react-router-dom';
import { formatDay } from '#src/lib/formats.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { Page } from '#src/ui/page.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { instantsOf, isWeek, readRange, stepRange, weekOf, writeRange, type DayRange } from './model/week.ts';
import { Report } from './report.tsx';
import { reportQuery } from './report-query.ts';

export function Component() {
  const shop = useShop();
  const formats = useFormats();
  const [params, setParams] = useSearchParams();
  const today = formats.today();
  const range = readRange(params, today);
  if (!may.seeUse(shop.role))
    return (
      <Page title="Booth use">
        <EmptyState title="Booth use is for owners and leads">Your role does not show it.</EmptyState>
      </Page>
    );
  return (
    <Page
      title="Booth use"
      about={`${formatDay(range.first, 'short', today)} to ${formatDay(range.last, 'short', today)}`}
      actions={<RangeSteps range={range} today={today} go={(next) => setParams(writeRange(next, today))} />}
    >
      <RangeReport shopId={shop.id} range={range} />
    </Page>
  );
}

type RangeStepsProps = { range: DayRange; today: string; go: (range: DayRange) => void };

function RangeSteps({ range, today, go }: RangeStepsProps) {
  const what = isWeek(range) ? 'week' : 'range';
  return (
    <div className="flex items-center gap-2 print:hidden">
      <IconButton
        bordered
        label={`Previous ${what}`}
        icon={<ChevronLeft size={18} aria-hidden="true" />}
        onClick={() => go(stepRange(range, -1))}
      />
      <Button onClick={() => go(weekOf(today))}>This week</Button>
      <IconButton
        bordered
        label={`Next ${what}`}
        icon={<ChevronRight size={18} aria-hidden="true" />}
        onClick={() => go(stepRange(range, 1))}
      />
      <Button icon={<Printer size={16} aria-hidden="true" />} onClick={() => print()}>
        Print
      </Button>
    </div>
  );
}

function RangeReport({ shopId, range }: { shopId: string; range: DayRange }) {
  const { zone } = useFormats();
  const { data, error, isPlaceholderData, refetch } = useQuery(reportQuery(shopId, instantsOf(range, zone)));
  const note = error && (
    <ErrorNote
      error={error}
      what="Booth use could not be worked out."
      {...(data && !isPlaceholderData ? { kept: 'The figures below are as they were.' } : {})}
      retry={() => void refetch()}
    />
  );
  if (!data || (error && isPlaceholderData)) return note ?? <ReportToCome />;
  return (
    <div
      className={isPlaceholderData ? 'flex flex-col gap-4 opacity-60' : 'flex flex-col gap-4'}
      aria-busy={isPlaceholderData}
    >
      {note}
      <Report places={data.places} to={data.to} serverTime={data.serverTime} />
    </div>
  );
}

const ReportToCome = () => (
  <div role="status" className="flex flex-col gap-4">
    <span className="sr-only">Working out the hours</span>
    {[0, 1, 2, 3].map((i) => (
      <Skeleton key={i} className="h-14 w-full rounded" />
    ))}
  </div>
);
