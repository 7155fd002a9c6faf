import { useId, type ReactNode } from 'react';
import { cx } from '#src/lib/cx.ts';

type Option<T extends string> = { value: T; label: ReactNode };
type ChoiceProps<T extends string> = {
  label: string;
  options: readonly Option<T>[];
  value: T;
  onChange: (value: T) => void;
  hideLabel?: boolean;
  className?: string;
};

/** One of a few, side by side: radio buttons that look like a switch. */
export function Choice<T extends string>({ label, options, value, onChange, hideLabel, className }: ChoiceProps<T>) {
  const name = useId();
  return (
    <fieldset className={cx('min-w-0', className)}>
      <legend className={hideLabel ? 'sr-only' : 'mb-1 text-[0.8125rem] font-semibold'}>{label}</legend>
      <div className="inline-flex max-w-full flex-wrap rounded border border-edge bg-surface">
        {options.map((option) => (
          <label
            key={option.value}
            className={cx(
              'flex min-h-[calc(var(--control)-2px)] items-center justify-center gap-1.5 rounded-[5px] px-3.5 font-semibold',
              'has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-petrol',
              option.value === value ? 'bg-ink text-surface' : 'text-ink hover:bg-paper',
            )}
          >
            <input
              type="radio"
              className="sr-only"
              name={name}
              value={option.value}
              checked={option.value === value}
              onChange={() => onChange(option.value)}
            />
            {option.label}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
