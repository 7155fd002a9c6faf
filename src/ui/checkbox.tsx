import { useId, type ComponentProps, type ReactNode } from 'react';
import { cx } from '#src/lib/cx.ts';

type CheckboxProps = Omit<ComponentProps<'input'>, 'type' | 'className'> & {
  label: ReactNode;
  hint?: ReactNode;
  className?: string;
};

export function Checkbox({ label, hint, className, ...input }: CheckboxProps) {
  const id = useId();
  return (
    <div className={cx('flex min-h-control-small items-start gap-2.5', className)}>
      <input
        {...input}
        id={id}
        type="checkbox"
        aria-describedby={hint ? `${id}-hint` : undefined}
        className="mt-0.5 size-[1.125rem] shrink-0 accent-petrol"
      />
      <label htmlFor={id} className="min-w-0">
        {label}
        {hint && (
          <span id={`${id}-hint`} className="block text-xs text-muted">
            {hint}
          </span>
        )}
      </label>
    </div>
  );
}
