import { useId } from 'react';
import { cx } from '#src/lib/cx.ts';
import { pathOf, scale, thinned, ticks, type Point, type Span } from '../model/plot-geometry.ts';
import { plainNumber } from '../model/typed.ts';
import { useWidth } from './use-width.ts';

export type Tone = 'ember' | 'petrol' | 'crimson' | 'muted' | 'moss';
const strokes: Record<Tone, string> = {
  ember: 'stroke-ember',
  petrol: 'stroke-petrol',
  crimson: 'stroke-crimson',
  muted: 'stroke-muted',
  moss: 'stroke-moss',
};

export type Line = { points: readonly Point[]; tone: Tone; dashed?: boolean; axis?: 'left' | 'right' };
/** A level across the whole picture, with its name on it. */
export type Level = { y: number; tone: Tone; label: string; axis?: 'left' | 'right' };
export type PlotProps = {
  /** What the picture shows, in a sentence with its figures. */
  label: string;
  x: Span;
  y: Span;
  xName: string;
  yName: string;
  /** A second scale at the right. */
  right?: { span: Span; name: string };
  lines: readonly Line[];
  levels?: readonly Level[];
  /** Marked points of the left scale. */
  dots?: readonly (Point & { label: string })[];
  /** A part of the x axis that is set off. */
  shade?: Span | null;
  height?: number;
};

const edge = { left: 44, top: 22, bottom: 36 };

/** Lines over two axes, drawn for the width there is. */
export function Plot({ height = 240, ...plot }: PlotProps) {
  const [ref, width] = useWidth();
  return (
    <div ref={ref} className="min-w-0 overflow-hidden">
      <svg role="img" aria-label={plot.label} width={width} height={height} className="figures block text-[0.6875rem]">
        <Drawing {...plot} width={width} height={height} />
      </svg>
    </div>
  );
}

function Drawing({
  x,
  y,
  right,
  lines,
  levels = [],
  dots = [],
  shade,
  width,
  height,
  ...names
}: PlotProps & { width: number; height: number }) {
  const clip = useId();
  const [floor, end] = [height - edge.bottom, width - (right ? 44 : 12)];
  const toX = scale(x, { from: edge.left, to: end });
  const toLeft = scale(y, { from: floor, to: edge.top });
  const toRight = right ? scale(right.span, { from: floor, to: edge.top }) : toLeft;
  const yOf = (axis?: 'left' | 'right') => (axis === 'right' ? toRight : toLeft);
  const columns = Math.max(50, Math.floor(end - edge.left));
  return (
    <>
      <clipPath id={clip}>
        <rect x={edge.left} y={edge.top - 4} width={Math.max(0, end - edge.left)} height={floor - edge.top + 4} />
      </clipPath>
      {shade && (
        <rect
          x={toX(Math.max(x.from, shade.from))}
          y={edge.top}
          width={Math.max(0, toX(Math.min(x.to, shade.to)) - toX(Math.max(x.from, shade.from)))}
          height={floor - edge.top}
          className="fill-petrol-soft"
        />
      )}
      {ticks(y, 5).map((value) => (
        <g key={value}>
          <line x1={edge.left} x2={end} y1={toLeft(value)} y2={toLeft(value)} className="stroke-line" />
          <text x={edge.left - 6} y={toLeft(value) + 4} textAnchor="end" className="fill-muted">
            {plainNumber(value, 3)}
          </text>
        </g>
      ))}
      {right &&
        ticks(right.span, 5).map((value) => (
          <text key={value} x={end + 6} y={toRight(value) + 4} className="fill-muted">
            {plainNumber(value, 3)}
          </text>
        ))}
      {ticks(x, Math.max(2, width / 90)).map((value) => (
        <text key={value} x={toX(value)} y={floor + 15} textAnchor="middle" className="fill-muted">
          {plainNumber(value, 3)}
        </text>
      ))}
      <line x1={edge.left} x2={end} y1={floor} y2={floor} className="stroke-edge" />
      <text x={4} y={11} className="fill-muted">
        {names.yName}
      </text>
      {right && (
        <text x={width - 4} y={11} textAnchor="end" className="fill-muted">
          {right.name}
        </text>
      )}
      <text x={end} y={height - 4} textAnchor="end" className="fill-muted">
        {names.xName}
      </text>
      <g clipPath={`url(#${clip})`}>
        {lines.map(({ points, tone, dashed, axis }, i) => (
          <path
            key={i}
            d={pathOf(thinned(points, columns).map((point) => ({ x: toX(point.x), y: yOf(axis)(point.y) })))}
            className={cx('fill-transparent', strokes[tone])}
            strokeWidth={2}
            strokeLinejoin="round"
            strokeDasharray={dashed ? '5 4' : undefined}
          />
        ))}
      </g>
      {levels.map(({ y: at, tone, label, axis }, i) => (
        <g key={label}>
          <line
            x1={edge.left}
            x2={end}
            y1={yOf(axis)(at)}
            y2={yOf(axis)(at)}
            className={strokes[tone]}
            strokeWidth={1.5}
            strokeDasharray="2 3"
          />
          <LevelName
            // Side by side, so that names of levels near each other do not collide.
            x={axis === 'right' ? end - 4 : edge.left + 4 + i * 110}
            y={yOf(axis)(at) - 4}
            label={label}
            end={axis === 'right'}
          />
        </g>
      ))}
      {dots.map((dot) => (
        <g key={dot.label}>
          <circle cx={toX(dot.x)} cy={toLeft(dot.y)} r={4.5} className="fill-ember stroke-surface" strokeWidth={1.5} />
          <LevelName x={toX(dot.x) + 8} y={toLeft(dot.y) - 7} label={dot.label} end={false} />
        </g>
      ))}
    </>
  );
}

/** Letters with a rim in the colour of the ground, so that a line behind them does not strike them out. */
const LevelName = ({ x, y, label, end }: { x: number; y: number; label: string; end: boolean }) => (
  <text
    x={x}
    y={y}
    textAnchor={end ? 'end' : 'start'}
    className="fill-ink stroke-surface font-semibold"
    strokeWidth={3}
    style={{ paintOrder: 'stroke' }}
  >
    {label}
  </text>
);
