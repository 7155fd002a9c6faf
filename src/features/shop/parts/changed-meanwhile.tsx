import type { ReactNode } from 'react';
import { TriangleAlert } from 'lucide-react';

/** Somebody else saved first: what they made of it; what was typed here is kept. */
export const ChangedMeanwhile = ({ children }: { children?: ReactNode }) => (
  <div role="alert" className="flex items-start gap-2.5 rounded border border-amber bg-amber-soft px-3.5 py-2.5">
    <TriangleAlert size={18} className="mt-0.5 shrink-0 text-amber" aria-hidden="true" />
    <div className="min-w-0">
      <p className="font-semibold">Somebody else changed it in the meantime.</p>
      {children}
      <p>What you typed is kept. Save again to put it over theirs, or close to leave theirs.</p>
    </div>
  </div>
);
