import { ChevronLeft, ChevronRight } from 'lucide-react';
import { lazy, Suspense, useCallback, useMemo, useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import { paths } from '#src/app/paths.ts';
import { formatDay } from '#src/lib/formats.ts';
import { useFormats } from '#src/lib/session.ts';
import { useIsNarrow } from '#src/lib/use-media.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { closureWords } from '../parts/closure-form.ts';
import { addMonths, isMonth, monthOf, sayMonth, type Hours, type MonthEntry } from './model/month.ts';
import { DayEntries, MonthAgenda } from './month-agenda.tsx';
import './month.css';

const MonthGrid = lazy(async () => ({ default: (await import('./month-grid.tsx')).MonthGrid }));

/** A month as the shop has it: open, closed, serviced. `mayClose`: what is entered here can be opened and changed. */
export function MonthView({ data, mayClose }: { data: Hours; mayClose: boolean }) {
  const { zone, today } = useFormats();
  const [params] = useSearchParams();
  const asked = params.get('month');
  const day = today();
  const month = isMonth(asked) ? asked : day.slice(0, 7);
  const content = useMemo(() => monthOf(data, month, { zone, today: day }), [data, month, zone, day]);
  const [shown, setShown] = useState<string | null>(null);
  const isNarrow = useIsNarrow();
  const linkOf = useCallback(
    ({ closure }: MonthEntry): string | null => {
      if (closure.kind === 'maintenance') return paths.upkeep(mayClose ? { edit: closure.id } : undefined);
      return mayClose ? paths.hours({ view: 'month', month, edit: closure.id }) : null;
    },
    [mayClose, month],
  );
  const crowded = content.days.find((one) => one.day === shown);
  return (
    <section aria-label="Calendar" className="month flex flex-col gap-3">
      <MonthBar month={month} thisMonth={day.slice(0, 7)} />
      {content.entries.length === 0 && (
        <p className="text-muted">No holiday, closure, breakdown or maintenance in {sayMonth(month)}.</p>
      )}
      {isNarrow ? (
        <MonthAgenda days={content.days} things={data} linkOf={linkOf} />
      ) : (
        <Suspense fallback={<Skeleton className="h-[34rem]" />}>
          <MonthGrid
            month={month}
            label={sayMonth(month)}
            content={content}
            things={data}
            linkOf={linkOf}
            onMore={setShown}
          />
        </Suspense>
      )}
      <Legend hasPast={content.days.some(({ hours }) => hours === null)} />
      {crowded && (
        <Dialog open onOpenChange={() => setShown(null)} title={formatDay(crowded.day, 'long')}>
          <DayEntries day={crowded} things={data} linkOf={linkOf} />
        </Dialog>
      )}
    </section>
  );
}

function MonthBar({ month, thisMonth }: { month: string; thisMonth: string }) {
  const [, setParams] = useSearchParams();
  const show = (next: string) => setParams({ view: 'month', month: next }, { preventScrollReset: true });
  return (
    <div className="flex flex-wrap items-center gap-2">
      <IconButton
        bordered
        label="Earlier month"
        icon={<ChevronLeft size={18} aria-hidden="true" />}
        onClick={() => show(addMonths(month, -1))}
      />
      <Button onClick={() => show(thisMonth)} aria-current={month === thisMonth ? 'date' : undefined}>
        This month
      </Button>
      <IconButton
        bordered
        label="Later month"
        icon={<ChevronRight size={18} aria-hidden="true" />}
        onClick={() => show(addMonths(month, 1))}
      />
      <h3 aria-live="polite" className="ml-1 text-base font-bold">
        {sayMonth(month)}
      </h3>
    </div>
  );
}

const kinds = ['holiday', 'closure', 'maintenance', 'breakdown'] as const;

function Legend({ hasPast }: { hasPast: boolean }) {
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-1.5 text-[0.8125rem] text-muted">
      <ul aria-label="What the patterns mean" className="flex flex-wrap gap-x-4 gap-y-1.5">
        {kinds.map((kind) => (
          <li key={kind} className="flex items-center gap-1.5">
            <span aria-hidden="true" className={`closed-box closed-${kind} size-4`} />
            {closureWords[kind]}
          </li>
        ))}
        <li className="flex items-center gap-1.5">
          <span aria-hidden="true" className="day-shut size-4 rounded-sm border border-line" />
          Closed all day
        </li>
      </ul>
      {hasPast && <p>Hours are those from today on; past days had their own.</p>}
    </div>
  );
}
