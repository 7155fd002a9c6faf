import { cx } from '#src/lib/cx.ts';

/** A grey piece in the shape of what is coming. Give it the size of that thing, so that nothing jumps. */
export const Skeleton = ({ className }: { className?: string }) => (
  <div aria-hidden="true" className={cx('breathe rounded-sm bg-line', className ?? 'h-4 w-full')} />
);

/** Some lines of text or rows of a list that are on their way. */
export function SkeletonLines({ lines = 3, label = 'Loading' }: { lines?: number; label?: string }) {
  return (
    <div role="status" className="flex flex-col gap-3">
      <span className="sr-only">{label}</span>
      {Array.from({ length: lines }, (_, i) => (
        <Skeleton key={i} className={cx('h-4', i % 3 === 2 ? 'w-2/3' : 'w-full')} />
      ))}
    </div>
  );
}
