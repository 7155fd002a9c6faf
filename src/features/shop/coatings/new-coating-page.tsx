import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Navigate, useNavigate, useSearchParams } from 'react-router-dom';
import { v7 } from 'uuid';
import { createCoating, emptySheet, type CoatingDetail } from '#contracts/coatings.ts';
import { paths } from '#src/app/paths.ts';
import { ApiError } from '#src/lib/api-error.ts';
import { may, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { coatingQuery } from './data/coating-queries.ts';
import { useCoatingWrite, useKeepCoating } from './data/use-coating-write.ts';
import { Doubts, Film } from './editor/film.tsx';
import { SheetCautions } from './editor/sheet-cautions.tsx';
import { SheetFields } from './editor/sheet-fields.tsx';
import { useSheetForm } from './editor/use-sheet-form.ts';
import { sentFaults } from './model/sent-faults.ts';
import type { SheetFields as Fields } from './model/sheet-form.ts';

/** A new data sheet, from nothing or like another one. */
export function Component() {
  const shop = useShop();
  const copyOf = useSearchParams()[0].get('copy');
  const { data, error } = useQuery({ ...coatingQuery(shop.id, copyOf ?? ''), enabled: copyOf !== null });
  if (!may.keepSheets(shop.role)) return <Navigate to={paths.coatings()} replace />;
  if (copyOf !== null && !data)
    return (
      <Page title="New data sheet">
        {error ? (
          <ErrorNote error={error} what="The sheet to copy could not be loaded." />
        ) : (
          <Skeleton className="h-96 w-full rounded" />
        )}
      </Page>
    );
  return <NewSheet key={copyOf} like={data ?? null} />;
}

const blank: Fields = { name: '', kind: 'clear', sheet: emptySheet };

function NewSheet({ like }: { like: CoatingDetail | null }) {
  const shop = useShop();
  const navigate = useNavigate();
  const keep = useKeepCoating();
  const [id] = useState(() => v7());
  const from = like ? { ...like, name: `${like.name}, copy` } : blank;
  const state = useSheetForm(like ? `like.${like.id}` : 'new', from);
  const create = useCoatingWrite(createCoating, (made) => {
    state.drop();
    keep(made);
    showToast(`${made.name} is kept`, { tone: 'good' });
    void navigate(paths.coating(made.id), { replace: true });
  });
  const send = (fields: Fields) =>
    create.mutate(
      { params: { shopId: shop.id }, body: { id, ...fields } },
      { onError: (error) => error instanceof ApiError && state.tellFaults(sentFaults(error.fields)) },
    );
  const leave = () => {
    state.drop();
    void navigate(paths.coatings());
  };
  return (
    <Page
      title="New data sheet"
      about={like ? `Like ${like.name}; the PDF does not come along` : 'From the maker’s sheet'}
    >
      <form
        noValidate
        className="grid grid-cols-1 items-start gap-4 lg:grid-cols-[minmax(0,1fr)_20rem]"
        onSubmit={(event) => {
          event.preventDefault();
          state.submit(send);
        }}
      >
        <SheetFields state={state} readOnly={false} />
        <div className="flex flex-col gap-4 lg:sticky lg:top-4">
          <Film sheet={state.sheet} />
          <Doubts sheet={state.sheet} />
          {create.error !== null && (
            <ErrorNote error={create.error} what="Nothing was kept." kept="What you typed is still here." />
          )}
          <div className="flex flex-wrap gap-2">
            <Button onClick={leave}>Leave it</Button>
            <Button type="submit" look="primary" busy={create.isPending}>
              Keep data sheet
            </Button>
          </div>
          <SheetCautions />
        </div>
      </form>
    </Page>
  );
}
