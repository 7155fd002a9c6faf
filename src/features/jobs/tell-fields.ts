import type { FieldPath, FieldValues, UseFormSetError } from 'react-hook-form';
import { isApiError } from '#src/lib/api-error.ts';
import { formPath } from './model/job-form.ts';

/** Puts what the server found wrong at the fields that are meant; the first of them gets the focus. */
export function tellFields<T extends FieldValues>(error: unknown, setError: UseFormSetError<T>): void {
  if (!isApiError(error, 'bad-request')) return;
  let isFirst = true;
  for (const { path, message } of error.fields) {
    const field = formPath(path);
    if (field === null) continue;
    // formPath answers only with names that the form has.
    setError(field as FieldPath<T>, { type: 'server', message: sentence(message) }, { shouldFocus: isFirst });
    isFirst = false;
  }
}

const sentence = (text: string): string => `${text.charAt(0).toUpperCase()}${text.slice(1).replace(/\.?$/, '.')}`;
