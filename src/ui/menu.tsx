import { DropdownMenu as Radix } from 'radix-ui';
import type { ReactNode } from 'react';
import { cx } from '#src/lib/cx.ts';

/** A menu that drops from its trigger (one element that takes a ref, such as Button). Children: MenuItem and its kin. */
export function Menu({
  trigger,
  children,
  align = 'end',
}: {
  trigger: ReactNode;
  children: ReactNode;
  align?: 'start' | 'end';
}) {
  return (
    <Radix.Root modal={false}>
      <Radix.Trigger asChild>{trigger}</Radix.Trigger>
      <Radix.Portal>
        <Radix.Content
          align={align}
          sideOffset={6}
          collisionPadding={8}
          className="rise card z-50 max-h-[80dvh] min-w-52 max-w-80 overflow-y-auto p-1 shadow-float"
        >
          {children}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}

const item = cx(
  'flex min-h-control w-full select-none items-center gap-2.5 rounded-sm px-2.5 text-left no-underline outline-none',
  'data-highlighted:bg-paper data-disabled:opacity-50 [&_svg]:shrink-0',
);

type ItemProps = {
  children: ReactNode;
  icon?: ReactNode;
  shortcut?: string;
  danger?: boolean;
  disabled?: boolean;
  onSelect?: () => void;
  /** The only child is a link that takes the item's place. */
  asChild?: boolean;
};

export function MenuItem({ children, icon, shortcut, danger, disabled, onSelect, asChild }: ItemProps) {
  const common = {
    className: cx(item, danger && 'text-crimson'),
    ...(disabled === undefined ? {} : { disabled }),
    ...(onSelect ? { onSelect: () => onSelect() } : {}),
  };
  if (asChild)
    return (
      <Radix.Item asChild {...common}>
        {children}
      </Radix.Item>
    );
  return (
    <Radix.Item {...common}>
      {icon}
      <span className="min-w-0 grow">{children}</span>
      {shortcut && <kbd className="font-sans text-xs text-muted">{shortcut}</kbd>}
    </Radix.Item>
  );
}

type MenuChoiceProps<T extends string> = {
  label: string;
  value: T;
  onChange: (value: T) => void;
  options: readonly { value: T; label: string }[];
};

/** One of several, ticked. */
export function MenuChoice<T extends string>({ label, value, onChange, options }: MenuChoiceProps<T>) {
  return (
    <Radix.RadioGroup value={value} onValueChange={(next) => onChange(next as T)}>
      <MenuLabel>{label}</MenuLabel>
      {options.map((option) => (
        <Radix.RadioItem key={option.value} value={option.value} className={cx(item, 'pl-8 relative')}>
          <Radix.ItemIndicator className="absolute left-3 size-2 rounded-full bg-ember" />
          {option.label}
        </Radix.RadioItem>
      ))}
    </Radix.RadioGroup>
  );
}

export const MenuLabel = ({ children }: { children: ReactNode }) => (
  <Radix.Label className="px-2.5 pt-2 pb-1 text-xs font-semibold text-muted">{children}</Radix.Label>
);
export const MenuLine = () => <Radix.Separator className="my-1 h-px bg-line" />;
