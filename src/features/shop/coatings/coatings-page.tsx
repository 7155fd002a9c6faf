import { useQuery } from '@tanstack/react-query';
import { FileText, Plus } from 'lucide-react';
import { Link, useSearchParams } from 'react-router-dom';
import { exportCoatings, importCoatings, type CoatingDetail } from '#contracts/coatings.ts';
import { paths } from '#src/app/paths.ts';
import { coatingKindWords } from '#src/lib/coating-words.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { Badge } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { Choice } from '#src/ui/choice.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { CsvPanel } from '../parts/csv-panel.tsx';
import { surveyQuery } from './data/coating-queries.ts';
import { SheetCautions } from './editor/sheet-cautions.tsx';
import { keyFigures } from './model/key-figures.ts';

const shown = [
  { value: 'no', label: 'In use' },
  { value: 'yes', label: 'Retired' },
] as const;

/** The coatings of the shop with what their makers' sheets ask for. */
export function Component() {
  const shop = useShop();
  const [search, setSearch] = useSearchParams();
  const retired = search.get('retired') === 'yes' ? 'yes' : 'no';
  const { data, error, refetch } = useQuery(surveyQuery(shop.id, retired));
  const mayKeep = may.keepSheets(shop.role);
  const choose = (value: 'no' | 'yes') => setSearch(value === 'yes' ? { retired: 'yes' } : {}, { replace: true });
  return (
    <Page
      title="Data sheets"
      about="What each coating needs, from its maker’s sheet"
      actions={
        <>
          <Choice label="Show" hideLabel options={shown} value={retired} onChange={choose} />
          <CsvPanel
            what="data sheets"
            exportFrom={exportCoatings}
            importTo={mayKeep ? importCoatings : undefined}
            columns="A line a coating, found by its name. Times in minutes, temperatures in °C, distances in metres; several cautions divided by |. Export first for every column."
          />
          {mayKeep && <NewButton />}
        </>
      }
    >
      {error && !data ? (
        <ErrorNote error={error} what="The data sheets could not be loaded." retry={() => void refetch()} />
      ) : !data ? (
        <ListToCome />
      ) : data.coatings.length === 0 ? (
        retired === 'yes' ? (
          <EmptyState title="No data sheet is retired">
            Those taken out of use are kept here and can be brought back.
          </EmptyState>
        ) : (
          <EmptyState title="No data sheet yet" action={mayKeep && <NewButton />}>
            A data sheet says what a coating needs: coats and flashes, recoat window, pot life and cures. Enter it from
            the maker’s sheet and attach that as PDF; process sheets take their times from it.
          </EmptyState>
        )
      ) : (
        <ul aria-label={retired === 'yes' ? 'Retired data sheets' : 'Data sheets in use'} className="grid gap-2.5">
          {data.coatings.map((coating) => (
            <CoatingRow key={coating.id} coating={coating} />
          ))}
        </ul>
      )}
      <SheetCautions />
    </Page>
  );
}

const NewButton = () => (
  <Button look="primary" icon={<Plus size={16} aria-hidden="true" />} asChild>
    <Link to={paths.newCoating()}>New data sheet</Link>
  </Button>
);

function CoatingRow({ coating }: { coating: CoatingDetail }) {
  const formats = useFormats();
  const { id, name, kind, sheet, usedBy, document } = coating;
  return (
    <li className="card grid grid-cols-1 items-center gap-x-5 gap-y-2 p-3.5 has-[a:hover]:border-edge md:grid-cols-[minmax(0,1fr)_minmax(0,2fr)_8rem]">
      <div className="min-w-0">
        <p className="font-bold wrap-anywhere">
          <Link to={paths.coating(id)} className="hover:underline">
            {name}
          </Link>
        </p>
        <p className="text-[0.8125rem] text-muted">
          {coatingKindWords[kind]}
          {sheet.maker && `, ${sheet.maker}`}
        </p>
      </div>
      <dl className="figures grid grid-cols-[auto_minmax(0,1fr)] gap-x-3 gap-y-0.5 text-[0.8125rem] sm:grid-cols-[auto_minmax(0,1fr)_auto_minmax(0,1fr)]">
        {keyFigures(sheet, formats).map(({ label, text }) => (
          <div key={label} className="contents">
            <dt className="text-muted">{label}</dt>
            <dd>{text}</dd>
          </div>
        ))}
      </dl>
      <div className="flex flex-wrap items-center gap-x-3 gap-y-1 text-[0.8125rem] md:flex-col md:items-end">
        <span>{usedText(usedBy.length)}</span>
        {document ? (
          <Badge tone="petrol">
            <FileText size={12} aria-hidden="true" />
            PDF
          </Badge>
        ) : (
          <span className="text-xs text-muted">no PDF</span>
        )}
      </div>
    </li>
  );
}

const usedText = (count: number): string =>
  count === 0 ? 'in no process sheet' : count === 1 ? 'in 1 process sheet' : `in ${count} process sheets`;

const ListToCome = () => (
  <div role="status" className="grid gap-2.5">
    <span className="sr-only">Loading the data sheets</span>
    {Array.from({ length: 5 }, (_, i) => (
      <Skeleton key={i} className="h-20 w-full rounded" />
    ))}
  </div>
);
