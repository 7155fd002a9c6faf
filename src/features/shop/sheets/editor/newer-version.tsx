import { useState } from 'react';
import type { SheetDetail } from '#contracts/sheets.ts';
import { useFormats } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import type { Change } from '../model/changes.ts';
import { ChangesTable } from './changes-table.tsx';

type NewerVersionProps = {
  theirs: SheetDetail;
  /** From what they have posted to what stands here. */
  changes: readonly Change[];
  onTakeTheirs: () => void;
  onKeepMine: () => void;
};

/** Somebody else has posted a version meanwhile: nothing here is lost, and nothing of theirs is overwritten unseen. */
export function NewerVersion({ theirs, changes, onTakeTheirs, onKeepMine }: NewerVersionProps) {
  const { dateTime } = useFormats();
  const [comparing, compare] = useState(false);
  const [newest] = theirs.versions;
  return (
    <div role="alert" className="flex flex-col gap-2 rounded border border-amber bg-amber-soft px-3.5 py-3">
      <p className="font-semibold">
        {newest?.by ?? 'Somebody'} posted version {theirs.version} {newest ? dateTime(newest.at) : ''}, after you began.
        Your changes are kept.
      </p>
      {newest?.note && <p>{newest.note}</p>}
      <div className="flex flex-wrap gap-2">
        <Button onClick={() => compare(true)}>Compare mine with theirs</Button>
        <Button onClick={onKeepMine}>Go on with mine</Button>
        <Button look="quiet" onClick={onTakeTheirs}>
          Let mine go and take theirs
        </Button>
      </div>
      {comparing && (
        <Dialog open onOpenChange={compare} title="Mine beside theirs" shape="wide">
          <ChangesTable
            label="Differences"
            changes={changes}
            before={`Version ${theirs.version}, theirs`}
            after="Mine"
          />
        </Dialog>
      )}
    </div>
  );
}
