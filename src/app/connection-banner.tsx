import { CloudOff, RefreshCcw } from 'lucide-react';
import { useConnection } from '#src/lib/connection.ts';
import { useFormats } from '#src/lib/session.ts';

/** Says that what is shown may be old, and since when. The place is always there, so that it is read out when it fills. */
export function ConnectionBanner() {
  const { state, since } = useConnection();
  const { time } = useFormats();
  return (
    <div role="status" className="print:hidden">
      {state !== 'fine' && (
        <p className="flex items-center justify-center gap-2 bg-amber-soft px-4 py-1.5 text-[0.8125rem] font-semibold text-amber shadow-[inset_0_-1px_0_var(--amber)]">
          {state === 'offline' ? (
            <>
              <CloudOff size={16} className="shrink-0" aria-hidden="true" />
              No connection. You see the shop as it was at {time(since)}.
            </>
          ) : (
            <>
              <RefreshCcw size={16} className="shrink-0" aria-hidden="true" />
              Changes by others have not come in since {time(since)}. Trying again.
            </>
          )}
        </p>
      )}
    </div>
  );
}
