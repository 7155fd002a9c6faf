import { Check, CircleAlert, X } from 'lucide-react';
import { Toast as Radix } from 'radix-ui';
import { dropToast, useToasts, type Toast } from './toast-store.ts';

/** Where toasts appear; once in the app. They wait while the pointer or the focus rests on them. */
export function Toaster() {
  const toasts = useToasts();
  return (
    <Radix.Provider swipeDirection="right" label="Message">
      {toasts.map((toast) => (
        <OneToast key={toast.id} toast={toast} />
      ))}
      <Radix.Viewport className="fixed right-4 bottom-4 z-50 flex w-[min(24rem,calc(100vw-2rem))] flex-col gap-2 outline-none max-sm:bottom-20" />
    </Radix.Provider>
  );
}

function OneToast({ toast }: { toast: Toast }) {
  const { act, tone } = toast;
  return (
    <Radix.Root
      duration={act ? 12_000 : 6_000}
      type={tone === 'bad' ? 'foreground' : 'background'}
      onOpenChange={(open) => {
        if (!open) dropToast(toast.id);
      }}
      className="rise flex items-center gap-2.5 rounded bg-ink px-3.5 py-2 text-surface shadow-float"
    >
      {tone === 'good' && <Check size={18} aria-hidden="true" className="shrink-0" />}
      {tone === 'bad' && <CircleAlert size={18} aria-hidden="true" className="shrink-0" />}
      <Radix.Description className="min-w-0 grow">{toast.text}</Radix.Description>
      {act && (
        <Radix.Action asChild altText={act.label}>
          <button
            type="button"
            onClick={act.run}
            className="min-h-control-small shrink-0 rounded-sm border border-current px-2.5 font-semibold"
          >
            {act.label}
          </button>
        </Radix.Action>
      )}
      <Radix.Close
        aria-label="Close message"
        className="-mr-2 flex size-control-small shrink-0 items-center justify-center rounded-sm"
      >
        <X size={16} aria-hidden="true" />
      </Radix.Close>
    </Radix.Root>
  );
}
