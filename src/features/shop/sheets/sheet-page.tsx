import { useQuery } from '@tanstack/react-query';
import { Archive, ArchiveRestore, CopyPlus, Download } from 'lucide-react';
import { Link, useParams } from 'react-router-dom';
import type { SheetDetail } from '#contracts/sheets.ts';
import { paths } from '#src/app/paths.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { may, useShop } from '#src/lib/session.ts';
import { Badge } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { coatingsQuery, groundQuery, sheetQuery } from './data/sheet-queries.ts';
import { currentSheetOf, useChangeSheet, useExportSheet, useSaveSheet } from './data/use-sheet-deeds.ts';
import { SheetEditor } from './editor/sheet-editor.tsx';
import { draftOf } from './model/draft.ts';

export function Component() {
  const shop = useShop();
  const { sheetId = '' } = useParams();
  const sheet = useQuery(sheetQuery(shop.id, sheetId));
  const coatings = useQuery(coatingsQuery(shop.id));
  const ground = useQuery(groundQuery(shop.id));
  if (sheet.error && isApiError(sheet.error, 'not-found'))
    return (
      <Page title="No such process sheet" actions={<Back />}>
        <EmptyState title="This shop has no such process sheet">It may belong to another of your shops.</EmptyState>
      </Page>
    );
  const failed = [sheet, coatings].find((query) => query.error && query.data === undefined);
  if (failed?.error)
    return (
      <Page title="Process sheet" actions={<Back />}>
        <ErrorNote
          error={failed.error}
          what="The process sheet could not be loaded."
          kept="What you had changed is kept."
          retry={() => void failed.refetch()}
        />
      </Page>
    );
  if (!sheet.data || !coatings.data || ground.isPending) return <ToCome title={sheet.data?.name ?? 'Process sheet'} />;
  return (
    <Loaded
      key={`${shop.id}/${sheetId}`}
      sheet={sheet.data}
      coatings={coatings.data.coatings}
      ground={ground.data ?? null}
      readOnly={!may.keepSheets(shop.role)}
    />
  );
}

const Back = () => (
  <Button look="quiet" asChild>
    <Link to={paths.sheets()}>All process sheets</Link>
  </Button>
);

export const ToCome = ({ title }: { title: string }) => (
  <Page title={title} width="wide">
    <div role="status" className="flex flex-col gap-4">
      <span className="sr-only">Loading the process sheet</span>
      <Skeleton className="h-40 w-full rounded" />
      <div className="grid gap-4 lg:grid-cols-[18rem_minmax(0,1fr)]">
        <Skeleton className="h-80 rounded" />
        <Skeleton className="h-96 rounded" />
      </div>
    </div>
  </Page>
);

type LoadedProps = Pick<Parameters<typeof SheetEditor>[0], 'coatings' | 'ground' | 'readOnly'> & { sheet: SheetDetail };

function Loaded({ sheet, coatings, ground, readOnly }: LoadedProps) {
  const shop = useShop();
  const save = useSaveSheet(shop.id, sheet.id);
  const about = readOnly ? 'Lead and owner change it; you can read it.' : undefined;
  return (
    <Page
      title={sheet.name}
      width="wide"
      about={
        <span className="flex flex-wrap items-center gap-2">
          Version {sheet.version}
          {sheet.retiredAt !== null && <Badge tone="amber">retired</Badge>}
          {about}
        </span>
      }
      actions={<Deeds sheet={sheet} readOnly={readOnly} />}
    >
      <SheetEditor
        draftName={`sheet.${shop.id}.${sheet.id}`}
        initial={draftOf(sheet)}
        sheet={sheet}
        coatings={coatings}
        ground={ground}
        readOnly={readOnly}
        saving={{
          busy: save.isPending,
          // A newer version is told of by the editor itself.
          error: currentSheetOf(save.error) ? null : save.error,
          reset: save.reset,
          save: ({ name, body }, version, note, done) =>
            save.mutate(
              { version, name: name.trim(), body, note },
              {
                onSuccess: (saved) => {
                  done(saved);
                  showToast(`Version ${saved.version} is saved. New jobs are made from it.`, { tone: 'good' });
                },
              },
            ),
        }}
      />
    </Page>
  );
}

function Deeds({ sheet, readOnly }: { sheet: SheetDetail; readOnly: boolean }) {
  const shop = useShop();
  const change = useChangeSheet(shop.id);
  const toFile = useExportSheet(shop.id);
  const retired = sheet.retiredAt !== null;
  const setRetired = (to: boolean, revision: number) =>
    change.mutate(
      { sheetId: sheet.id, revision, retired: to },
      {
        onSuccess: (now) =>
          showToast(to ? `${now.name} is retired. Its jobs go on.` : `${now.name} is in use again.`, {
            ...(to ? { act: { label: 'Bring it back', run: () => setRetired(false, now.revision) } } : {}),
          }),
        onError: () => showToast('That did not work. Look at the sheet again and repeat it.', { tone: 'bad' }),
      },
    );
  return (
    <>
      <Back />
      <Button
        icon={<Download size={16} aria-hidden="true" />}
        busy={toFile.isPending}
        onClick={() =>
          toFile.mutate(sheet.id, {
            onError: () => showToast('The file could not be made. Try again.', { tone: 'bad' }),
          })
        }
      >
        File
      </Button>
      {!readOnly && (
        <>
          <Button icon={<CopyPlus size={16} aria-hidden="true" />} asChild>
            <Link to={paths.newSheet(sheet.id)}>Copy</Link>
          </Button>
          <Button
            icon={retired ? <ArchiveRestore size={16} aria-hidden="true" /> : <Archive size={16} aria-hidden="true" />}
            busy={change.isPending}
            onClick={() => setRetired(!retired, sheet.revision)}
          >
            {retired ? 'Bring back' : 'Retire'}
          </Button>
        </>
      )}
    </>
  );
}
