import type { ReactNode } from 'react';
import { Toaster } from '#src/ui/toaster.tsx';
import { TooltipProvider } from '#src/ui/tooltip.tsx';

/** What floats above the pages of the signed-in. */
export const Overlays = ({ children }: { children: ReactNode }) => (
  <TooltipProvider>
    {children}
    <Toaster />
  </TooltipProvider>
);
