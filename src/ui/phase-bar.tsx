import { cx } from '#src/lib/cx.ts';
import { phaseWords, type PieceKind } from '#src/lib/phase-words.ts';
import { phaseClass } from './phase-class.ts';

type Piece = { kind: PieceKind; /** Any unit, the same for all pieces. */ size: number };
type PhaseBarProps = {
  pieces: readonly Piece[];
  /** The bar in words. Absent where the words stand beside it: it is then only a drawing. */
  label?: string;
  /** 0 to 1: a line where it stands now. */
  now?: number | null;
  height?: 'line' | 'row' | 'bay';
  className?: string;
};

const heights = { line: 'h-2', row: 'h-6', bay: 'h-12' };
/** Phases side by side like coats in a film, each as wide as it lasts. */
export function PhaseBar({ pieces, label, now = null, height = 'row', className }: PhaseBarProps) {
  const spoken = label === undefined ? { 'aria-hidden': true } : { role: 'img', 'aria-label': label };
  return (
    <span {...spoken} className={cx('relative block', heights[height], className)}>
      <span className="flex h-full overflow-hidden rounded-sm border border-edge">
        {pieces.map((piece, i) => (
          // A hair between two pieces, so that two coats of one kind do not run into each other.
          <i
            key={i}
            className={cx('h-full min-w-0.5 border-surface', i > 0 && 'border-l', phaseClass[piece.kind])}
            style={{ flex: `${piece.size} 0 0` }}
          />
        ))}
      </span>
      {now !== null && (
        <i
          className="absolute -inset-y-1.5 w-0.75 -translate-x-1/2 rounded-full bg-ink outline-2 outline-surface"
          style={{ left: `${Math.min(1, Math.max(0, now)) * 100}%` }}
        />
      )}
    </span>
  );
}

/** A small piece of the pattern, to stand beside its word. */
export const PhaseSwatch = ({ kind, className }: { kind: PieceKind; className?: string }) => (
  <i
    aria-hidden="true"
    className={cx('inline-block h-3.5 w-6 shrink-0 rounded-sm border border-edge', phaseClass[kind], className)}
  />
);

/** What the patterns mean, for the kinds that are drawn. */
export function PhaseLegend({ kinds, className }: { kinds: readonly PieceKind[]; className?: string }) {
  return (
    <ul aria-label="Patterns" className={cx('flex flex-wrap gap-x-4 gap-y-1.5 text-xs text-muted', className)}>
      {kinds.map((kind) => (
        <li key={kind} className="flex items-center gap-1.5">
          <PhaseSwatch kind={kind} />
          {phaseWords[kind]}
        </li>
      ))}
    </ul>
  );
}
