import { useCallback, useState } from 'react';
import { cx } from '#src/lib/cx.ts';
import type { Formats } from '#src/lib/formats.ts';
import { longestGap, stretches, valueSpan, type ChartPoint } from './model/air-chart.ts';

type TimeChartProps = {
  /** What it shows, in a sentence with its figures. */
  label: string;
  name: string;
  points: readonly ChartPoint[];
  from: number;
  to: number;
  tone: 'ember' | 'petrol' | 'moss';
  /** A line that must not be passed, with its name. */
  gate?: { value: number; name: string };
  /** The least height of the scale, in the unit of the values. */
  least: number;
  digits?: number;
  formats: Formats;
};

const strokes = { ember: 'stroke-ember', petrol: 'stroke-petrol', moss: 'stroke-moss' };
const fills = { ember: 'fill-ember', petrol: 'fill-petrol', moss: 'fill-moss' };
const edge = { left: 40, right: 10, top: 20, bottom: 20 };
const height = 140;

/** A line over the hours, drawn for the width there is. Holes in the readings stay holes. */
export function TimeChart({ label, name, points, from, to, tone, gate, least, digits = 0, formats }: TimeChartProps) {
  const [ref, width] = useWidth();
  const span = valueSpan([...points.map(({ value }) => value), ...(gate ? [gate.value] : [])], least);
  const x = (at: number) => edge.left + ((at - from) / (to - from)) * (width - edge.left - edge.right);
  const y = (value: number) =>
    height - edge.bottom - ((value - span.from) / (span.to - span.from)) * (height - edge.top - edge.bottom);
  const lines = Array.from(
    { length: Math.round((span.to - span.from) / span.step) + 1 },
    (_, i) => span.from + i * span.step,
  );
  const long = to - from > 2 * 86_400_000;
  return (
    <div ref={ref} className="min-w-0 overflow-hidden">
      <svg role="img" aria-label={label} width={width} height={height} className="figures block text-[0.6875rem]">
        <text x={4} y={11} className="fill-muted font-semibold">
          {name}
        </text>
        {lines.map((value) => (
          <g key={value}>
            <line x1={edge.left} x2={width - edge.right} y1={y(value)} y2={y(value)} className="stroke-line" />
            <text x={edge.left - 6} y={y(value) + 4} textAnchor="end" className="fill-muted">
              {value.toFixed(digits).replace('-', '−')}
            </text>
          </g>
        ))}
        {timeTicks(from, to, width, formats).map(({ at, words }) => (
          <text key={at} x={x(at)} y={height - 4} textAnchor="middle" className="fill-muted">
            {long ? words.day : words.time}
          </text>
        ))}
        {gate && (
          <>
            <rect
              x={edge.left}
              width={Math.max(0, width - edge.left - edge.right)}
              y={y(gate.value)}
              height={Math.max(0, height - edge.bottom - y(gate.value))}
              className="fill-crimson-soft"
            />
            <line
              x1={edge.left}
              x2={width - edge.right}
              y1={y(gate.value)}
              y2={y(gate.value)}
              className="stroke-crimson"
              strokeDasharray="5 3"
            />
            <text
              x={width - edge.right - 2}
              y={y(gate.value) + 12}
              textAnchor="end"
              className="fill-crimson font-semibold"
            >
              {gate.name}
            </text>
          </>
        )}
        {stretches(points, longestGap(from, to)).map((part) =>
          part.length === 1 ? (
            <circle
              key={part[0]?.at}
              cx={x(part[0]?.at ?? 0)}
              cy={y(part[0]?.value ?? 0)}
              r={3}
              className={fills[tone]}
            />
          ) : (
            <path
              key={part[0]?.at}
              d={part
                .map(({ at, value }, i) => `${i === 0 ? 'M' : 'L'}${x(at).toFixed(1)} ${y(value).toFixed(1)}`)
                .join('')}
              className={cx('fill-none', strokes[tone])}
              strokeWidth={2}
              strokeLinejoin="round"
            />
          ),
        )}
      </svg>
    </div>
  );
}

function timeTicks(from: number, to: number, width: number, formats: Formats) {
  const count = Math.max(2, Math.floor(width / 110));
  const long = to - from > 2 * 86_400_000;
  const each = long
    ? 86_400_000
    : ([3, 4, 6, 12].map((hours) => hours * 3_600_000).find((ms) => (to - from) / ms <= count + 1) ?? 43_200_000);
  const first = Math.ceil(from / 3_600_000) * 3_600_000;
  const ticks = Array.from({ length: Math.floor((to - first) / each) + 1 }, (_, i) => first + i * each);
  const step = Math.ceil(ticks.length / (count + 1));
  return ticks
    .filter((_, i) => i % step === 0)
    .filter((at) => at - from > (to - from) / 30 && to - at > (to - from) / 30)
    .map((at) => ({ at, words: { day: formats.date(at), time: formats.time(at) } }));
}

function useWidth(): [ref: (element: Element | null) => (() => void) | undefined, width: number] {
  const [width, setWidth] = useState(560);
  const ref = useCallback((element: Element | null) => {
    if (!element || typeof ResizeObserver === 'undefined') return undefined;
    const observer = new ResizeObserver(([entry]) => {
      const now = Math.floor(entry?.contentRect.width ?? 0);
      if (now > 0) setWidth(now);
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, width];
}
