import { useFormats } from '#src/lib/session.ts';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { useServerNow } from './data/use-server-now.ts';

type StaleNoteProps = { error: unknown; since: number | null; retry: () => void };

/** What is shown is old: how old, so that one can judge whether to work by it. */
export function StaleNote({ error, since, retry }: StaleNoteProps) {
  const now = useServerNow(0);
  const { time, duration } = useFormats();
  const kept = since === null ? null : `What you see is from ${time(since)}, ${duration((now - since) / 60_000)} ago.`;
  return (
    <ErrorNote error={error} what="The bench could not be loaded." {...(kept === null ? {} : { kept })} retry={retry} />
  );
}

export const BenchToCome = () => (
  <div role="status" className="flex flex-col gap-4">
    <span className="sr-only">Loading the bench</span>
    <Skeleton className="h-72 w-full rounded" />
    <Skeleton className="h-40 w-full rounded" />
  </div>
);
