import { useFormats } from '#src/lib/session.ts';
import type { DewAnswer } from '../model/dew.ts';
import { degrees } from '../model/finding-words.ts';
import { scale } from '../model/plot-geometry.ts';
import { useWidth } from './use-width.ts';

/** A line of temperature: wet up to the dew point, too near up to the least surface, free beyond; marks for surface and air. */
export function DewScale({ answer: { gate, surfaceCelsius, airCelsius } }: { answer: DewAnswer }) {
  const { unit } = useFormats();
  const [ref, width] = useWidth();
  const all = [gate.dewPointCelsius, gate.leastSurfaceCelsius, surfaceCelsius, airCelsius];
  const span = { from: Math.min(...all) - 3, to: Math.max(...all) + 3 };
  const toX = scale(span, { from: 2, to: width - 2 });
  const [dew, least] = [toX(gate.dewPointCelsius), toX(gate.leastSurfaceCelsius)];
  const label = `Dew point ${degrees(gate.dewPointCelsius, unit)}, surface ${degrees(surfaceCelsius, unit)}, air ${degrees(airCelsius, unit)}`;
  return (
    <div ref={ref} className="min-w-0 overflow-hidden">
      <svg role="img" aria-label={label} width={width} height={104} className="figures block text-xs">
        <defs>
          <pattern id="dew-near" width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
            <rect width="6" height="6" className="fill-amber-soft" />
            <line x1="0" y1="0" x2="0" y2="6" className="stroke-amber" strokeWidth="2" />
          </pattern>
        </defs>
        <rect x={2} y={40} height={20} width={dew - 2} className="fill-petrol" />
        <rect x={dew} y={40} height={20} width={least - dew} fill="url(#dew-near)" />
        <rect x={least} y={40} height={20} width={width - 2 - least} className="fill-moss-soft" />
        <rect x={2} y={40} height={20} width={width - 4} className="fill-transparent stroke-edge" />
        <Mark x={toX(surfaceCelsius)} width={width} above text={`surface ${degrees(surfaceCelsius, unit)}`} strong />
        <Mark x={dew} width={width} text={`dew point ${degrees(gate.dewPointCelsius, unit)}`} />
        <Mark x={toX(airCelsius)} width={width} second text={`air ${degrees(airCelsius, unit)}`} />
      </svg>
    </div>
  );
}

type MarkProps = { x: number; width: number; text: string; above?: boolean; second?: boolean; strong?: boolean };

function Mark({ x, width, text, above, second, strong }: MarkProps) {
  const half = text.length * 3.3;
  const at = Math.min(Math.max(x, half), width - half);
  const [from, to] = above ? [20, 66] : [34, second ? 84 : 68];
  return (
    <g>
      <line x1={x} x2={x} y1={from} y2={to} className="stroke-ink" strokeWidth={strong ? 3 : 1.5} />
      <text
        x={at}
        y={above ? 14 : second ? 98 : 80}
        textAnchor="middle"
        className={strong ? 'fill-ink font-bold' : 'fill-muted'}
      >
        {text}
      </text>
    </g>
  );
}
