import { cx } from '#src/lib/cx.ts';
import { widthOf } from '../model/chain.ts';

type GapLineProps = { gap: { min: number; max: number | null }; className?: string };

/** The window as a line that begins at the earliest start; without a latest one it fades out. Beside its words, so only drawn. */
export function GapLine({ gap: { min, max }, className }: GapLineProps) {
  const all = widthOf(max ?? Math.max(min * 3, 240));
  const from = Math.min(96, (widthOf(min) / Math.max(1, all)) * 100);
  const tight = max !== null && (max - min < 15 || max - min < max / 4);
  const closed = max !== null && max < min;
  return (
    <span
      aria-hidden="true"
      className={cx('relative block h-2.5', closed ? 'text-crimson' : tight ? 'text-amber' : 'text-petrol', className)}
    >
      <i className="absolute top-1/2 left-0 h-px -translate-y-1/2 bg-edge" style={{ width: `${from}%` }} />
      <i
        className="absolute top-1/2 right-0 h-0.5 -translate-y-1/2 bg-current"
        style={{
          left: `${from}%`,
          ...(max === null ? { maskImage: 'linear-gradient(90deg, #000 40%, transparent)' } : {}),
        }}
      />
      <i className="absolute inset-y-0 w-0.5 -translate-x-1/2 bg-ink" style={{ left: `${from}%` }} />
    </span>
  );
}
