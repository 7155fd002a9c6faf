import { useQuery } from '@tanstack/react-query';
import { Copy } from 'lucide-react';
import { useId } from 'react';
import { Link, useParams } from 'react-router-dom';
import type { CoatingDetail } from '#contracts/coatings.ts';
import { paths } from '#src/app/paths.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { coatingKindWords } from '#src/lib/coating-words.ts';
import { may, useShop } from '#src/lib/session.ts';
import { Badge } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { ChangedMeanwhile } from '../parts/changed-meanwhile.tsx';
import { coatingQuery } from './data/coating-queries.ts';
import { DocumentPanel } from './editor/document-panel.tsx';
import { Doubts, Film } from './editor/film.tsx';
import { RetireButton } from './editor/retire-button.tsx';
import { SheetCautions } from './editor/sheet-cautions.tsx';
import { SheetFields } from './editor/sheet-fields.tsx';
import { TouchedPanel } from './editor/touched-panel.tsx';
import { useSheetSave } from './editor/use-sheet-save.ts';

/** One data sheet: read by everybody, kept by leads and owners. */
export function Component() {
  const shop = useShop();
  const { coatingId = '' } = useParams();
  const { data, error, refetch } = useQuery(coatingQuery(shop.id, coatingId));
  if (data) return <Sheet key={data.id} coating={data} />;
  return (
    <Page title="Data sheet">
      {error ? (
        <ErrorNote error={error} what="The data sheet could not be loaded." retry={() => void refetch()} />
      ) : (
        <div role="status">
          <span className="sr-only">Loading the data sheet</span>
          <Skeleton className="h-96 w-full rounded" />
        </div>
      )}
    </Page>
  );
}

function Sheet({ coating }: { coating: CoatingDetail }) {
  const mayKeep = may.keepSheets(useShop().role);
  const { state, save, send, meanwhile, takeBack } = useSheetSave(coating);
  const formId = useId();
  const readOnly = !mayKeep || coating.retiredAt !== null;
  return (
    <Page
      title={coating.name}
      about={
        <span className="flex items-center gap-2">
          {coatingKindWords[coating.kind]}
          {coating.retiredAt !== null && <Badge tone="amber">retired</Badge>}
        </span>
      }
      actions={
        mayKeep && (
          <>
            <Button icon={<Copy size={16} aria-hidden="true" />} asChild>
              <Link to={paths.newCoating(coating.id)}>Duplicate</Link>
            </Button>
            <RetireButton coating={coating} />
          </>
        )
      }
    >
      <div className="grid grid-cols-1 items-start gap-4 lg:grid-cols-[minmax(0,1fr)_20rem]">
        <form
          id={formId}
          noValidate
          onSubmit={(event) => {
            event.preventDefault();
            state.submit(send);
          }}
        >
          <SheetFields state={state} readOnly={readOnly} />
        </form>
        <div className="flex min-w-0 flex-col gap-4">
          <Film sheet={state.sheet} />
          <Doubts sheet={state.sheet} />
          {!readOnly && (
            <div className="flex flex-col gap-3">
              {meanwhile && (
                <ChangedMeanwhile>{meanwhile.length > 0 && <p>Theirs: {meanwhile.join('; ')}.</p>}</ChangedMeanwhile>
              )}
              {save.error !== null && !isApiError(save.error, 'stale') && (
                <ErrorNote error={save.error} what="Nothing was saved." kept="What you typed is still here." />
              )}
              <div className="flex flex-wrap gap-2">
                <Button disabled={!state.isDirty} onClick={takeBack}>
                  Take back
                </Button>
                <Button type="submit" form={formId} look="primary" busy={save.isPending} disabled={!state.isDirty}>
                  Save data sheet
                </Button>
              </div>
              <p role="status" className="text-xs text-muted">
                {state.isDirty ? 'Not saved yet; kept on this device.' : 'All is saved.'}
              </p>
            </div>
          )}
          <TouchedPanel coating={coating} isDirty={state.isDirty} />
          <DocumentPanel coating={coating} mayKeep={mayKeep} />
          <SheetCautions />
        </div>
      </div>
    </Page>
  );
}
