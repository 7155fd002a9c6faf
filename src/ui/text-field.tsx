import { Eye, EyeOff } from 'lucide-react';
import { useState, type ComponentProps } from 'react';
import { cx } from '#src/lib/cx.ts';
import { boxClasses } from './box-classes.ts';
import { Field, type FieldProps } from './field.tsx';

type TextFieldProps = FieldProps & Omit<ComponentProps<'input'>, 'className'>;

/** One line of text. Takes what react-hook-form's `register` gives. */
export function TextField({ label, hint, error, optional, hideLabel, className, ...input }: TextFieldProps) {
  const field = { label, hint, error, className, ...flags(optional, hideLabel) };
  return <Field {...field}>{(ids) => <input type="text" {...input} {...ids} className={boxClasses} />}</Field>;
}

/** A password that can be shown. Pasting and password managers work. */
export function PasswordField({ label, hint, error, optional, hideLabel, className, ...input }: TextFieldProps) {
  const [shown, setShown] = useState(false);
  const Icon = shown ? EyeOff : Eye;
  return (
    <Field {...{ label, hint, error, className, ...flags(optional, hideLabel) }}>
      {(ids) => (
        <div className="relative">
          <input {...input} {...ids} type={shown ? 'text' : 'password'} className={cx(boxClasses, 'pr-12')} />
          <button
            type="button"
            aria-pressed={shown}
            aria-label="Show what is typed"
            onClick={() => setShown(!shown)}
            className="absolute inset-y-0 right-0 flex w-11 items-center justify-center rounded text-muted hover:text-ink"
          >
            <Icon size={18} aria-hidden="true" />
          </button>
        </div>
      )}
    </Field>
  );
}

type TextAreaProps = FieldProps & Omit<ComponentProps<'textarea'>, 'className'>;

export function TextArea({ label, hint, error, optional, hideLabel, className, rows = 3, ...area }: TextAreaProps) {
  return (
    <Field {...{ label, hint, error, className, ...flags(optional, hideLabel) }}>
      {(ids) => <textarea rows={rows} {...area} {...ids} className={cx(boxClasses, 'resize-y py-2')} />}
    </Field>
  );
}

const flags = (optional: boolean | undefined, hideLabel: boolean | undefined) => ({
  optional: optional ?? false,
  hideLabel: hideLabel ?? false,
});
