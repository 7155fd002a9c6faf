import { Link } from 'react-router-dom';
import { paths } from '#src/app/paths.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';

type NotMadeProps = { error: unknown; jobId: string; onAnother: () => void };

/** Why no job came of it. An answer may have been lost on the way: then the job is there, and the form has changed since. */
export function NotMade({ error, jobId, onAnother }: NotMadeProps) {
  if (isApiError(error, 'key-reused'))
    return (
      <div role="alert" className="flex flex-col gap-2 rounded border border-amber bg-amber-soft px-3.5 py-3">
        <p className="font-semibold">This form has already made a job; you changed the form after that.</p>
        <div className="flex flex-wrap gap-2">
          <Button asChild>
            <Link to={paths.job(jobId)}>Open that job</Link>
          </Button>
          <Button onClick={onAnother}>Make a second job of this form</Button>
        </div>
      </div>
    );
  return <ErrorNote error={error} what="The job was not made." kept="The form is kept." />;
}
