import { ChevronDown } from 'lucide-react';
import type { ComponentProps, ReactNode } from 'react';
import { cx } from '#src/lib/cx.ts';
import { boxClasses } from './box-classes.ts';
import { Field, type FieldProps } from './field.tsx';

type SelectProps = FieldProps & Omit<ComponentProps<'select'>, 'className' | 'children'> & { children: ReactNode };

/** The system's own list, which every phone and screen reader handles well. Children are `<option>`s. */
export function Select({ label, hint, error, optional, hideLabel, className, children, ...select }: SelectProps) {
  const field = { label, hint, error, className, optional: optional ?? false, hideLabel: hideLabel ?? false };
  return (
    <Field {...field}>
      {(ids) => (
        <div className="relative">
          <select {...select} {...ids} className={cx(boxClasses, 'appearance-none truncate pr-9')}>
            {children}
          </select>
          <ChevronDown
            size={16}
            className="pointer-events-none absolute inset-y-0 right-3 my-auto text-muted"
            aria-hidden="true"
          />
        </div>
      )}
    </Field>
  );
}
