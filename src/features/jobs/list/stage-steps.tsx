import { cx } from '#src/lib/cx.ts';

/** How far along its chain a job is: a box for each stage, filled when done; many stages become one bar. */
export function StageSteps({ done, total }: { done: number; total: number }) {
  const words = `${done} of ${total}`;
  return (
    <span className="flex items-center gap-2">
      <span aria-hidden="true" className="flex h-2.5 w-24 shrink-0 gap-px">
        {total <= 16 ? (
          Array.from({ length: total }, (_, i) => (
            <i
              key={i}
              className={cx('flex-1 rounded-[1px] border', i < done ? 'border-moss bg-moss' : 'border-edge')}
            />
          ))
        ) : (
          <span className="w-full overflow-hidden rounded-[1px] border border-edge">
            <i className="block h-full bg-moss" style={{ width: `${(done / total) * 100}%` }} />
          </span>
        )}
      </span>
      <span className="figures text-xs whitespace-nowrap text-muted">
        <span className="sr-only">Stages done: </span>
        {words}
      </span>
    </span>
  );
}
