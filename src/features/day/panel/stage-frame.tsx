import { X } from 'lucide-react';
import { useEffect, useRef, type ReactNode } from 'react';
import { Dialog } from '#src/ui/dialog.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';

type Props = { title: string; beside: boolean; onClose: () => void; children: ReactNode };

/** Beside the timeline where there is room, so that both are seen; else a sheet over it. */
export function StageFrame({ title, beside, onClose, children }: Props) {
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => {
    heading.current?.focus({ preventScroll: true });
  }, [title]);
  if (!beside)
    return (
      <Dialog open onOpenChange={(open) => !open && onClose()} title={title} shape="panel">
        {children}
      </Dialog>
    );
  return (
    <aside
      className="card sticky top-16 flex max-h-[calc(100dvh-5rem)] w-88 shrink-0 flex-col self-start overflow-y-auto p-4"
      aria-label={title}
      onKeyDown={(event) => event.key === 'Escape' && onClose()}
    >
      <header className="mb-3 flex items-start justify-between gap-2">
        <h2 ref={heading} tabIndex={-1} className="outline-none">
          {title}
        </h2>
        <IconButton label="Close" shortcut="Esc" size="small" icon={<X size={16} />} onClick={onClose} />
      </header>
      {children}
    </aside>
  );
}
