import { Link } from 'react-router-dom';
import { paths } from '#src/app/paths.ts';
import { ApiError } from '#src/lib/api-error.ts';
import { useFormats } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';

type RetireDialogProps = {
  name: string;
  busy: boolean;
  error: unknown;
  onRetire: () => void;
  onClose: () => void;
};

/** Out of use: no plan counts on it. Where posted work is still to be done there it is named, with the way to that day. */
export function RetireDialog({ name, busy, error, onRetire, onClose }: RetireDialogProps) {
  const { dayOf } = useFormats();
  const reasons = error instanceof ApiError ? error.reasons : [];
  const [first] = reasons.flatMap(({ at }) => at[0] ?? []);
  const inAll = reasons[0]?.minutes[0] ?? reasons.length;
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Take ${name} out of use`}
      about="What happened there stays on record. It can be brought back."
      actions={
        <>
          <Button onClick={onClose}>Keep it</Button>
          <Button look="primary" busy={busy} onClick={onRetire}>
            Retire it
          </Button>
        </>
      }
    >
      {error !== null && (
        <ErrorNote error={error} what={`${name} stays in use.`}>
          {inAll > reasons.length && (
            <p>
              These are the first {reasons.length} of {inAll}.
            </p>
          )}
          {first !== undefined && (
            <p>
              Plan that work elsewhere and post, then retire {name}.{' '}
              <Link to={paths.day({ date: dayOf(first) })} className="link">
                Open the day of the first
              </Link>
            </p>
          )}
        </ErrorNote>
      )}
    </Dialog>
  );
}
