import { Button } from '#src/ui/button.tsx';

/** Says that the form was filled before, and how to be rid of it. */
export const Kept = ({ onAnew }: { onAnew: () => void }) => (
  <div
    role="status"
    className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 rounded border border-line bg-surface px-3.5 py-2"
  >
    <p>This is the form as you left it.</p>
    <Button size="small" look="quiet" onClick={onAnew}>
      Start with an empty form
    </Button>
  </div>
);

/** Stays in reach at the foot of a phone, above the bar with the main places. */
export const SendBar = ({ busy, faulty }: { busy: boolean; faulty: boolean }) => (
  <div className="flex flex-wrap items-center gap-x-4 gap-y-2 max-sm:sticky max-sm:bottom-[calc(3.5rem+env(safe-area-inset-bottom))] max-sm:z-10 max-sm:-mx-4 max-sm:border-t max-sm:border-line max-sm:bg-surface max-sm:px-4 max-sm:py-3">
    <Button type="submit" look="primary" busy={busy} className="max-sm:grow">
      Make the job
    </Button>
    {faulty && (
      <p role="status" className="font-semibold text-crimson">
        Something is missing; it is marked above.
      </p>
    )}
  </div>
);
