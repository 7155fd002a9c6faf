import { LoaderCircle } from 'lucide-react';
import { Slot } from 'radix-ui';
import type { ComponentProps, ReactNode } from 'react';
import { cx } from '#src/lib/cx.ts';

export type ButtonLook = 'plain' | 'primary' | 'quiet' | 'danger';
export type ButtonSize = 'small' | 'usual' | 'bay' | 'glove';

const looks: Record<ButtonLook, string> = {
  plain: 'border border-edge bg-surface text-ink hover:bg-paper active:bg-line',
  primary: 'bg-ember text-on-ember hover:bg-[color-mix(in_srgb,var(--ember)_88%,var(--ink))]',
  quiet: 'text-ink hover:bg-[color-mix(in_srgb,var(--ink)_8%,transparent)]',
  danger: 'bg-crimson text-on-crimson hover:bg-[color-mix(in_srgb,var(--crimson)_86%,var(--ink))]',
};
// `bay` and `glove` are for the bench: 56 px, and 20 mm, which gloved hands hit without looking twice.
const sizes: Record<ButtonSize, string> = {
  small: 'min-h-control-small gap-1.5 px-2.5 text-[0.8125rem]',
  usual: 'min-h-control gap-2 px-3.5',
  bay: 'min-h-14 gap-2.5 px-5 text-base',
  glove: 'min-h-[4.75rem] gap-3 px-6 text-xl',
};

export type ButtonProps = ComponentProps<'button'> & {
  look?: ButtonLook;
  size?: ButtonSize;
  /** Work goes on: it shows, says so, and takes no second press. */
  busy?: boolean;
  icon?: ReactNode;
  /** The only child becomes the button: for links that look like one. */
  asChild?: boolean;
};

export function Button({ look = 'plain', size = 'usual', busy = false, icon, asChild, ...props }: ButtonProps) {
  const { children, className, onClick, type = 'button', ...rest } = props;
  const classes = cx(
    'inline-flex select-none items-center justify-center rounded font-semibold whitespace-nowrap no-underline',
    'transition-colors duration-100 disabled:cursor-not-allowed disabled:opacity-50 [&_svg]:shrink-0',
    busy && 'cursor-progress opacity-80',
    looks[look],
    sizes[size],
    className,
  );
  if (asChild)
    return (
      <Slot.Root className={classes} {...rest}>
        {children}
      </Slot.Root>
    );
  return (
    <button
      type={type}
      className={classes}
      aria-busy={busy || undefined}
      aria-disabled={busy || undefined}
      onClick={busy ? (event) => event.preventDefault() : onClick}
      {...rest}
    >
      {busy ? <LoaderCircle size={16} className="animate-spin" aria-hidden="true" /> : icon}
      {children}
    </button>
  );
}
