import { cx } from '#src/lib/cx.ts';

/** Work that takes over a second. `value` from 0 to 1, or null where nobody can say how far it is. */
export function Progress({ label, value, className }: { label: string; value: number | null; className?: string }) {
  const percent = value === null ? undefined : Math.round(Math.min(1, Math.max(0, value)) * 100);
  return (
    <div
      role="progressbar"
      aria-label={label}
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuenow={percent}
      className={cx('h-1.5 overflow-hidden rounded-full bg-line', className)}
    >
      <div
        className={cx('h-full rounded-full bg-ember transition-[width]', percent === undefined && 'breathe')}
        style={{ width: `${percent ?? 100}%` }}
      />
    </div>
  );
}
