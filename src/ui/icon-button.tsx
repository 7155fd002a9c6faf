import type { ComponentProps, ReactNode } from 'react';
import { cx } from '#src/lib/cx.ts';
import { Tooltip } from './tooltip.tsx';

type IconButtonProps = Omit<ComponentProps<'button'>, 'children'> & {
  /** What it does, for those who hear the page and as its tooltip. */
  label: string;
  icon: ReactNode;
  size?: 'small' | 'usual' | 'bay';
  /** Key that does the same, shown in the tooltip: "Ctrl Z". */
  shortcut?: string;
  bordered?: boolean;
};

const sizes = { small: 'size-control-small', usual: 'size-control', bay: 'size-14' };

export function IconButton({ label, icon, size = 'usual', shortcut, bordered, className, ...rest }: IconButtonProps) {
  return (
    <Tooltip text={label} {...(shortcut === undefined ? {} : { shortcut })}>
      <button
        type="button"
        aria-label={label}
        className={cx(
          'inline-flex shrink-0 items-center justify-center rounded text-ink transition-colors duration-100',
          'hover:bg-[color-mix(in_srgb,var(--ink)_8%,transparent)] disabled:opacity-40',
          'aria-pressed:bg-[color-mix(in_srgb,var(--petrol)_16%,transparent)] aria-pressed:text-petrol',
          bordered && 'border border-edge bg-surface',
          sizes[size],
          className,
        )}
        {...rest}
      >
        {icon}
      </button>
    </Tooltip>
  );
}
