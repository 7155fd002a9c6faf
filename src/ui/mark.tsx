import { cx } from '#src/lib/cx.ts';

/** The mark: the arch of the oven that the ovenbird builds. */
export const Mark = ({ className }: { className?: string }) => (
  <svg viewBox="0 0 32 32" className={cx('text-ember', className ?? 'size-7')} aria-hidden="true">
    <path
      fill="currentColor"
      d="M2 17C2 8.5 7.8 3 16 3s14 5.5 14 14v9a5 5 0 0 1-5 5h-4.5V21a4.5 4.5 0 0 0-9 0v10H7a5 5 0 0 1-5-5z"
    />
  </svg>
);
