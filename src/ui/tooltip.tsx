import { Tooltip as Radix } from 'radix-ui';
import type { ReactNode } from 'react';

/** Says what its only child does. Never the only place of something one has to know: fingers cannot hover. */
export function Tooltip({ text, shortcut, children }: { text: string; shortcut?: string; children: ReactNode }) {
  return (
    <Radix.Root>
      <Radix.Trigger asChild>{children}</Radix.Trigger>
      <Radix.Portal>
        <Radix.Content
          sideOffset={6}
          collisionPadding={8}
          className="rise z-50 max-w-72 rounded bg-ink px-2.5 py-1.5 text-xs font-semibold text-surface shadow-float"
        >
          {text}
          {shortcut && <kbd className="ml-2 font-sans font-normal opacity-75">{shortcut}</kbd>}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}

export const TooltipProvider = ({ children }: { children: ReactNode }) => (
  <Radix.Provider delayDuration={450} skipDelayDuration={200}>
    {children}
  </Radix.Provider>
);
