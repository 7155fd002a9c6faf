import { lazy, Suspense, type ReactNode } from 'react';
import { useToasts } from '#src/ui/toast-store.ts';
import { TooltipProvider } from '#src/ui/tooltip.tsx';

// Most visits see no toast: what draws them comes with the first one.
const Toaster = lazy(async () => ({ default: (await import('#src/ui/toaster.tsx')).Toaster }));

/** What floats above the pages of the signed-in. */
export function Overlays({ children }: { children: ReactNode }) {
  const isNeeded = useToasts().length > 0;
  return (
    <TooltipProvider>
      {children}
      <Suspense>{isNeeded && <Toaster />}</Suspense>
    </TooltipProvider>
  );
}
