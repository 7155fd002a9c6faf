import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { SheetBody, SheetDetail, SheetEdition } from '#contracts/sheets.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { Badge } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { versionQuery } from '../data/sheet-queries.ts';
import type { Change } from '../model/changes.ts';
import { ChangesTable } from './changes-table.tsx';

type VersionsListProps = {
  sheet: SheetDetail;
  changesTo: (older: SheetBody) => Change[];
  onTake: ((body: SheetBody) => void) | null;
};

/** All versions, newest first. Jobs keep the one they were made with, so old ones can be read and taken up again. */
export function VersionsList({ sheet, changesTo, onTake }: VersionsListProps) {
  const { dateTime } = useFormats();
  const [shown, show] = useState<SheetEdition | null>(null);
  return (
    <section aria-labelledby="sheet-versions" className="card flex flex-col gap-2 p-4">
      <h2 id="sheet-versions">Versions</h2>
      <ol className="flex max-h-72 flex-col divide-y divide-line overflow-y-auto">
        {sheet.versions.map((edition) => (
          <li key={edition.version} className="flex flex-col gap-0.5 py-2">
            <span className="flex flex-wrap items-center justify-between gap-x-2">
              <span>
                <b>Version {edition.version}</b>{' '}
                <span className="text-xs text-muted">
                  {dateTime(edition.at)}
                  {edition.by ? `, ${edition.by}` : ''}
                </span>
              </span>
              {edition.openJobs > 0 && (
                <Badge>{edition.openJobs === 1 ? '1 open job' : `${edition.openJobs} open jobs`}</Badge>
              )}
            </span>
            {edition.note && <span className="text-[0.8125rem] text-muted">{edition.note}</span>}
            {edition.version !== sheet.version && (
              <Button size="small" look="quiet" className="self-start -ml-2.5" onClick={() => show(edition)}>
                Compare with it
              </Button>
            )}
          </li>
        ))}
      </ol>
      {shown && (
        <OldVersion sheet={sheet} edition={shown} changesTo={changesTo} onTake={onTake} onClose={() => show(null)} />
      )}
    </section>
  );
}

type OldVersionProps = VersionsListProps & { edition: SheetEdition; onClose: () => void };

function OldVersion({ sheet, edition, changesTo, onTake, onClose }: OldVersionProps) {
  const shop = useShop();
  const { data, error, refetch } = useQuery(versionQuery(shop.id, sheet.id, edition.versionId));
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Version ${edition.version} and what stands here`}
      shape="wide"
      actions={
        data && onTake ? (
          <Button
            onClick={() => {
              onTake(data.body);
              onClose();
            }}
          >
            Take version {edition.version} up again
          </Button>
        ) : undefined
      }
    >
      {data ? (
        <ChangesTable
          label={`Since version ${edition.version}`}
          changes={changesTo(data.body)}
          before={`Version ${edition.version}`}
          after="Here"
        />
      ) : error ? (
        <ErrorNote error={error} what="That version could not be loaded." retry={() => void refetch()} />
      ) : (
        <Skeleton className="h-40 w-full rounded" />
      )}
    </Dialog>
  );
}
