import { TriangleAlert } from 'lucide-react';
import type { ReactNode } from 'react';
import { cx } from '#src/lib/cx.ts';

/** What could hurt somebody, said where the figures stand. `quiet` where it is a reminder beside many figures. */
export function Caution({ children, quiet }: { children: ReactNode; quiet?: boolean }) {
  return (
    <div
      role="note"
      aria-label="Caution"
      className={cx(
        'flex items-start gap-2.5',
        quiet ? 'text-xs text-muted' : 'rounded border border-amber bg-amber-soft px-3.5 py-2.5',
      )}
    >
      <TriangleAlert size={quiet ? 14 : 18} className="mt-0.5 shrink-0 text-amber" aria-hidden="true" />
      <div className="min-w-0">{children}</div>
    </div>
  );
}
