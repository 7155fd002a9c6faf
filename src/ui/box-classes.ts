import { cx } from '#src/lib/cx.ts';

/** Look of a box one types into. */
export const boxClasses = cx(
  'w-full min-h-control rounded border border-edge bg-surface px-3 text-ink placeholder:text-muted',
  'aria-invalid:border-crimson aria-invalid:bg-crimson-soft disabled:cursor-not-allowed disabled:opacity-60',
  '[&:is(input,textarea):read-only]:bg-paper max-sm:text-base',
);
