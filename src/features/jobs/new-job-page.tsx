import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { v7 } from 'uuid';
import { paths } from '#src/app/paths.ts';
import { useLocalDraft } from '#src/lib/local-draft.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { sheetsQuery } from './data/jobs-queries.ts';
import { emptyForm, isJobForm } from './model/job-form.ts';
import { NewJobForm } from './new/new-job-form.tsx';

export function Component() {
  const shop = useShop();
  return (
    <Page title="New job" actions={<BackToJobs />}>
      {may.keepJobs(shop.role) ? (
        // The draft belongs to the shop: its sheets mean nothing in another one.
        <FromSheets shopId={shop.id} />
      ) : (
        <EmptyState title="Jobs are made by office, lead or owner">Ask one of them to enter it.</EmptyState>
      )}
    </Page>
  );
}

const BackToJobs = () => (
  <Button look="quiet" asChild>
    <Link to={paths.jobs()}>All jobs</Link>
  </Button>
);

function FromSheets({ shopId }: { shopId: string }) {
  const formats = useFormats();
  const sheets = useQuery(sheetsQuery(shopId));
  const [empty] = useState(() => emptyForm(v7(), Date.now(), formats));
  const draft = useLocalDraft(`new-job.${shopId}`, empty, isJobForm);
  if (sheets.data === undefined) {
    if (!sheets.error) return <FormToCome />;
    return (
      <ErrorNote
        error={sheets.error}
        what="The process sheets could not be loaded."
        kept="What you had typed is kept."
        retry={() => void sheets.refetch()}
      />
    );
  }
  if (sheets.data.sheets.length === 0)
    return (
      <EmptyState title="No process sheet yet">
        A job is made from a process sheet, and this shop has none. An owner can set one up.
      </EmptyState>
    );
  return (
    <NewJobForm
      sheets={sheets.data.sheets}
      start={draft.start}
      wasKept={draft.wasKept}
      keep={draft.keep}
      drop={draft.drop}
    />
  );
}

const FormToCome = () => (
  <div role="status" className="grid gap-2.5 sm:grid-cols-2">
    <span className="sr-only">Loading process sheets</span>
    {Array.from({ length: 4 }, (_, i) => (
      <Skeleton key={i} className="h-32 w-full rounded" />
    ))}
  </div>
);
