import { Popover as Radix } from 'radix-ui';
import type { ReactNode } from 'react';

type PopoverProps = {
  trigger: ReactNode;
  /** Read out as the name of what opens. */
  label: string;
  children: ReactNode;
  align?: 'start' | 'center' | 'end';
  open?: boolean;
  onOpenChange?: (open: boolean) => void;
};

/** Details beside their trigger (one element that takes a ref); closes with Esc and by a click elsewhere. */
export function Popover({ trigger, label, children, align = 'start', open, onOpenChange }: PopoverProps) {
  return (
    <Radix.Root {...(open === undefined ? {} : { open })} {...(onOpenChange ? { onOpenChange } : {})}>
      <Radix.Trigger asChild>{trigger}</Radix.Trigger>
      <Radix.Portal>
        <Radix.Content
          aria-label={label}
          align={align}
          sideOffset={6}
          collisionPadding={8}
          className="rise card z-50 max-h-[80dvh] max-w-[min(24rem,calc(100vw-1rem))] overflow-y-auto p-4 shadow-float"
        >
          {children}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
