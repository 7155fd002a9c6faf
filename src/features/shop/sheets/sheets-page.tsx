import { useQuery } from '@tanstack/react-query';
import { Download, FileUp, Plus } from 'lucide-react';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { SheetSurvey } from '#contracts/sheets.ts';
import { paths } from '#src/app/paths.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { Badge } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { PhaseBar } from '#src/ui/phase-bar.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { optionsOn } from '#server/sheets/options.ts';
import { surveyQuery } from './data/sheet-queries.ts';
import { useExportSheets } from './data/use-sheet-deeds.ts';
import { ImportDialog } from './import-dialog.tsx';
import { chainOf, leastMinutes, type ChainLink } from './model/chain.ts';

export function Component() {
  const shop = useShop();
  const { data, error, refetch } = useQuery(surveyQuery(shop.id));
  const [importing, setImporting] = useState(false);
  const mayKeep = may.keepSheets(shop.role);
  const table = useExportSheets(shop.id);
  const inUse = data?.sheets.filter(({ retiredAt }) => retiredAt === null) ?? [];
  const retired = data?.sheets.filter(({ retiredAt }) => retiredAt !== null) ?? [];
  return (
    <Page
      title="Process sheets"
      about="How each kind of job is done: stages, ways, times and windows"
      actions={
        <>
          {inUse.length > 0 && (
            <Button
              look="quiet"
              icon={<Download size={16} aria-hidden="true" />}
              busy={table.isPending}
              onClick={() =>
                table.mutate(undefined, {
                  onError: () => showToast('The table could not be made. Try again.', { tone: 'bad' }),
                })
              }
            >
              CSV
            </Button>
          )}
          {mayKeep && (
            <>
              <Button icon={<FileUp size={16} aria-hidden="true" />} onClick={() => setImporting(true)}>
                From a file
              </Button>
              <NewSheetButton />
            </>
          )}
        </>
      }
    >
      {error && !data ? (
        <ErrorNote error={error} what="The process sheets could not be loaded." retry={() => void refetch()} />
      ) : !data ? (
        <ListToCome />
      ) : data.sheets.length === 0 ? (
        <EmptyState title="No process sheet yet" action={mayKeep && <NewSheetButton />}>
          A process sheet says how a kind of job is done: its stages in order, the ways to do each, and the windows
          between them. Jobs are made from it, and the planner keeps to it.
        </EmptyState>
      ) : (
        <>
          {inUse.length === 0 && <p className="text-muted">All sheets are retired: no job can be made.</p>}
          <SheetRows label="In use" sheets={inUse} />
          {retired.length > 0 && (
            <details>
              <summary className="min-h-control-small font-semibold">Retired ({retired.length})</summary>
              <div className="mt-2">
                <SheetRows label="Retired" sheets={retired} />
              </div>
            </details>
          )}
        </>
      )}
      {importing && <ImportDialog onClose={() => setImporting(false)} />}
    </Page>
  );
}

const NewSheetButton = () => (
  <Button look="primary" icon={<Plus size={16} aria-hidden="true" />} asChild>
    <Link to={paths.newSheet()}>New sheet</Link>
  </Button>
);

function SheetRows({ label, sheets }: { label: string; sheets: readonly SheetSurvey[] }) {
  return (
    <ul aria-label={label} className="grid gap-2.5">
      {sheets.map((sheet) => (
        <SheetRow key={sheet.id} sheet={sheet} />
      ))}
    </ul>
  );
}

function SheetRow({ sheet }: { sheet: SheetSurvey }) {
  const { duration, date } = useFormats();
  const { body, openJobs, version, name } = sheet;
  const chain = chainOf(body, optionsOn(body));
  return (
    <li className="card grid grid-cols-1 items-center gap-x-5 gap-y-1.5 p-3.5 has-[a:hover]:border-edge sm:grid-cols-[minmax(0,1fr)_minmax(0,1.2fr)_9.5rem]">
      <div className="min-w-0">
        <p className="flex flex-wrap items-center gap-x-2 font-bold">
          <Link to={paths.sheet(sheet.id)} className="hover:underline">
            {name}
          </Link>
          {sheet.retiredAt !== null && <Badge tone="amber">retired</Badge>}
        </p>
        {body.summary && <p className="text-[0.8125rem] text-muted">{body.summary}</p>}
      </div>
      <div className="flex min-w-0 flex-col gap-1">
        <MiniChain chain={chain} />
        <p className="figures text-xs text-muted">
          {chain.length === 1 ? '1 stage' : `${chain.length} stages`}, at least {duration(leastMinutes(chain))}
          {body.options.length > 0 && ` · ${body.options.length === 1 ? '1 option' : `${body.options.length} options`}`}
        </p>
      </div>
      <div className="flex items-center justify-between gap-3 text-[0.8125rem] sm:flex-col sm:items-end sm:gap-0.5">
        <span className="figures">
          {openJobs === 0 ? 'no open job' : openJobs === 1 ? '1 open job' : `${openJobs} open jobs`}
        </span>
        <span className="figures text-xs text-muted">
          Version {version}, {date(sheet.savedAt)}
        </span>
      </div>
    </li>
  );
}

/** The usual chain as one line of bars, each as wide as its stage lasts by the quickest way. */
const MiniChain = ({ chain }: { chain: readonly ChainLink[] }) => (
  <span aria-hidden="true" className="flex w-full items-center gap-1">
    {chain.map(({ key, minutes, phases }) => (
      <span key={key} className="min-w-1.5" style={{ flex: `${Math.max(minutes, 1)} 1 0` }}>
        <PhaseBar
          className="!h-4"
          pieces={phases.map((phase) => ({ kind: phase.kind, size: Math.max(1, phase.minutes) }))}
        />
      </span>
    ))}
  </span>
);

const ListToCome = () => (
  <div role="status" className="grid gap-2.5">
    <span className="sr-only">Loading the process sheets</span>
    {Array.from({ length: 5 }, (_, i) => (
      <Skeleton key={i} className="h-16 w-full rounded" />
    ))}
  </div>
);
