import { Link } from 'react-router-dom';
import type { Clash } from '#contracts/people.ts';
import { paths } from '#src/app/paths.ts';
import { useFormats } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';

type ClashesDialogProps = { name: string; clashes: readonly Clash[]; onClose: () => void };

/** Posted work that no longer fits somebody's hours, and the way to plan it again. */
export function ClashesDialog({ name, clashes, onClose }: ClashesDialogProps) {
  const { dateSpan, dayOf } = useFormats();
  const [first] = clashes;
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`${name} has posted work then`}
      about="The change is saved. This work still stands with them until it is planned again and posted."
      actions={
        <>
          <Button onClick={onClose}>Later</Button>
          {first && (
            <Button look="primary" asChild>
              <Link to={paths.day({ date: dayOf(first.from) })}>Open the booth day</Link>
            </Button>
          )}
        </>
      }
    >
      <ul className="flex flex-col gap-2">
        {clashes.map((clash) => (
          <li key={clash.stageId} className="rounded border border-line px-3 py-2">
            <Link to={paths.job(clash.jobId)} className="link font-semibold">
              {clash.jobNumber} {clash.jobTitle}
            </Link>
            <p className="text-muted">
              {clash.stageTitle}, {dateSpan(clash.from, clash.to)}
            </p>
          </li>
        ))}
      </ul>
    </Dialog>
  );
}
