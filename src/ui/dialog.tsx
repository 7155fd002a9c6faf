import { X } from 'lucide-react';
import { Dialog as Radix } from 'radix-ui';
import { useRef, type ReactNode } from 'react';
import { cx } from '#src/lib/cx.ts';
import { Button } from './button.tsx';

type DialogProps = {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: ReactNode;
  /** What it is about, under the title. */
  about?: ReactNode;
  children?: ReactNode;
  /** Buttons; the one that is meant most comes last. */
  actions?: ReactNode;
  /** `panel`: from the right edge, the page beside it stays in sight; from below on a phone. */
  shape?: 'box' | 'wide' | 'panel';
};

const shapes = {
  box: 'inset-x-0 bottom-0 rounded-t-lg sm:inset-x-auto sm:left-1/2 sm:top-[12vh] sm:bottom-auto sm:w-[28rem] sm:-translate-x-1/2 sm:rounded-lg',
  wide: 'inset-x-0 bottom-0 rounded-t-lg sm:inset-x-auto sm:left-1/2 sm:top-[6vh] sm:bottom-auto sm:w-[min(56rem,92vw)] sm:-translate-x-1/2 sm:rounded-lg',
  panel:
    'inset-x-0 bottom-0 rounded-t-lg sm:left-auto sm:inset-y-0 sm:right-0 sm:w-[26rem] sm:rounded-none sm:rounded-l-lg',
};

export function Dialog({ open, onOpenChange, title, about, children, actions, shape = 'box' }: DialogProps) {
  const cameFrom = useRef<Element | null>(null);
  return (
    <Radix.Root open={open} onOpenChange={onOpenChange}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-40 bg-veil" />
        <Radix.Content
          {...(about ? {} : { 'aria-describedby': undefined })}
          onOpenAutoFocus={() => {
            cameFrom.current = document.activeElement;
          }}
          onCloseAutoFocus={(event) => {
            // Without a trigger of its own the library would let the focus fall to the page's top.
            event.preventDefault();
            giveBackFocus(cameFrom.current);
          }}
          className={cx(
            'rise fixed z-40 flex max-h-[88dvh] flex-col bg-surface shadow-float focus:outline-none',
            shape === 'panel' && 'sm:max-h-none',
            shapes[shape],
          )}
        >
          <header className="flex items-start justify-between gap-3 px-5 pt-4 pb-3">
            <div className="min-w-0">
              <Radix.Title className="text-base font-bold">{title}</Radix.Title>
              {about && <Radix.Description className="mt-0.5 text-muted">{about}</Radix.Description>}
            </div>
            <Radix.Close
              aria-label="Close"
              className="-mr-2 -mt-1 flex size-control shrink-0 items-center justify-center rounded hover:bg-paper"
            >
              <X size={18} aria-hidden="true" />
            </Radix.Close>
          </header>
          {children && <div className="min-h-0 flex-1 overflow-y-auto px-5 pb-4">{children}</div>}
          {actions && (
            <footer className="flex flex-wrap justify-end gap-2 border-t border-line px-5 py-3 max-sm:*:grow">
              {actions}
            </footer>
          )}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}

function giveBackFocus(to: Element | null): void {
  // What had it may be gone, such as a menu's item or a row that was removed.
  const target = to?.isConnected && to !== document.body ? to : document.getElementById('page');
  if (target instanceof HTMLElement || target instanceof SVGElement) target.focus({ preventScroll: true });
}

type ConfirmProps = {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  /** Names the thing: "Withdraw job 2418?" */
  title: string;
  /** What follows from it, and whether it can be taken back. */
  about: string;
  /** The deed as a verb with its thing: "Withdraw job". */
  deed: string;
  keep?: string;
  busy?: boolean;
  onConfirm: () => void;
  /** Shown while it stays open because something went wrong. */
  children?: ReactNode;
};

/** Asks once, for what cannot be undone. */
export function ConfirmDialog({ deed, keep = 'Keep it', busy = false, onConfirm, ...dialog }: ConfirmProps) {
  return (
    <Dialog
      {...dialog}
      actions={
        <>
          <Button onClick={() => dialog.onOpenChange(false)}>{keep}</Button>
          <Button look="danger" busy={busy} onClick={onConfirm}>
            {deed}
          </Button>
        </>
      }
    />
  );
}
