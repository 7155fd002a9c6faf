import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate, useSearchParams } from 'react-router-dom';
import { v7 } from 'uuid';
import type { Coating } from '#contracts/coatings.ts';
import type { SheetDetail, SheetGround } from '#contracts/sheets.ts';
import { paths } from '#src/app/paths.ts';
import { may, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { coatingsQuery, groundQuery, sheetQuery } from './data/sheet-queries.ts';
import { useCreateSheet } from './data/use-sheet-deeds.ts';
import { SheetEditor } from './editor/sheet-editor.tsx';
import { emptyDraft } from './model/draft.ts';
import { ToCome } from './sheet-page.tsx';

/** A sheet that is not there yet: empty, or, with `?copy=`, like another one. It is made when it is first saved. */
export function Component() {
  const shop = useShop();
  const [search] = useSearchParams();
  const copyOf = search.get('copy');
  const coatings = useQuery(coatingsQuery(shop.id));
  const ground = useQuery(groundQuery(shop.id));
  const original = useQuery({ ...sheetQuery(shop.id, copyOf ?? ''), enabled: copyOf !== null });
  if (!may.keepSheets(shop.role))
    return (
      <Page title="New process sheet">
        <EmptyState title="Process sheets are kept by lead and owner">Ask one of them to make it.</EmptyState>
      </Page>
    );
  const failed = [coatings, ...(copyOf === null ? [] : [original])].find((query) => query.error);
  if (failed?.error)
    return (
      <Page title="New process sheet">
        <ErrorNote error={failed.error} what="It cannot be begun yet." retry={() => void failed.refetch()} />
      </Page>
    );
  if (!coatings.data || ground.isPending || (copyOf !== null && !original.data))
    return <ToCome title="New process sheet" />;
  return (
    <NewSheet
      key={`${shop.id}/${copyOf ?? ''}`}
      original={original.data ?? null}
      coatings={coatings.data.coatings}
      ground={ground.data ?? null}
    />
  );
}

type NewSheetProps = { original: SheetDetail | null; coatings: readonly Coating[]; ground: SheetGround | null };

function NewSheet({ original, coatings, ground }: NewSheetProps) {
  const shop = useShop();
  const navigate = useNavigate();
  const create = useCreateSheet(shop.id);
  const [initial] = useState(() => {
    const empty = emptyDraft(v7());
    return original ? { ...empty, name: `${original.name}, copy`, body: original.body } : empty;
  });
  return (
    <Page
      title="New process sheet"
      width="wide"
      about={original ? `Like ${original.name}` : undefined}
      actions={
        <Button look="quiet" asChild>
          <Link to={paths.sheets()}>All process sheets</Link>
        </Button>
      }
    >
      <SheetEditor
        draftName={`new-sheet.${shop.id}.${original?.id ?? ''}`}
        initial={initial}
        sheet={null}
        coatings={coatings}
        ground={ground}
        readOnly={false}
        saving={{
          busy: create.isPending,
          error: create.error,
          reset: create.reset,
          save: ({ id, name, body }, _version, note, done) =>
            create.mutate(
              { id, name: name.trim(), body, note },
              {
                onSuccess: (saved) => {
                  done(saved);
                  showToast(`${saved.name} is made. Jobs can be made from it.`, { tone: 'good' });
                  void navigate(paths.sheet(saved.id), { replace: true });
                },
              },
            ),
        }}
      />
    </Page>
  );
}
