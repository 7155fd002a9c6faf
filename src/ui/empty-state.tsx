import type { ReactNode } from 'react';

/** An empty place says what will be here and offers the first step. */
export function EmptyState({ title, children, action }: { title: string; children?: ReactNode; action?: ReactNode }) {
  return (
    <div className="flex flex-col items-center gap-2 px-4 py-10 text-center">
      <svg viewBox="0 0 48 48" className="size-12 text-line" aria-hidden="true">
        <path
          d="M5 43V25C5 13.5 13 6 24 6s19 7.5 19 19v18M17 43V32a7 7 0 0 1 14 0v11"
          fill="none"
          stroke="currentColor"
          strokeWidth="3"
          strokeLinecap="round"
          strokeDasharray="4 5"
        />
      </svg>
      <p className="text-base font-bold">{title}</p>
      {children && <div className="max-w-prose text-muted">{children}</div>}
      {action && <div className="mt-2 flex flex-wrap justify-center gap-2">{action}</div>}
    </div>
  );
}
