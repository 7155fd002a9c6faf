import type { LampPositions } from '#chemistry/infrared/lamp-positions.ts';
import { useDesk } from '../use-desk.ts';
import { parseNumber } from '../model/typed.ts';

/** The area with the lamp's field at each of its positions. */
export function PositionsDrawing({ positions: { across, down, turned } }: { positions: LampPositions }) {
  const { values } = useDesk();
  const metres = (text: string) => parseNumber(text) ?? 1;
  const panel = { wide: metres(values.pwide), high: metres(values.phigh) };
  const [wide, high] = turned ? [metres(values.high), metres(values.wide)] : [metres(values.wide), metres(values.high)];
  const step = (room: number, field: number, count: number) => (count > 1 ? (room - field) / (count - 1) : 0);
  const first = (room: number, field: number, count: number) => (count > 1 ? 0 : (room - field) / 2);
  const [full, tall] = [Math.max(panel.wide, wide), Math.max(panel.high, high)];
  const [left, top] = [(full - panel.wide) / 2, (tall - panel.high) / 2];
  const spots = Array.from({ length: Math.min(200, across * down) }, (_, i) => ({
    x: left + first(panel.wide, wide, across) + (i % across) * step(panel.wide, wide, across),
    y: top + first(panel.high, high, down) + Math.floor(i / across) * step(panel.high, high, down),
  }));
  return (
    <svg
      role="img"
      aria-label={`${across * down} lamp fields over an area of ${panel.wide} by ${panel.high} m`}
      viewBox={`-0.05 -0.05 ${full + 0.1} ${tall + 0.1}`}
      className="block max-h-40 w-full max-w-sm"
    >
      <rect
        x={left}
        y={top}
        width={panel.wide}
        height={panel.high}
        className="fill-paper stroke-ink"
        strokeWidth={0.012}
      />
      {spots.map(({ x, y }, i) => (
        <rect
          key={i}
          x={x}
          y={y}
          width={wide}
          height={high}
          fillOpacity={0.22}
          className="fill-ember stroke-ember"
          strokeWidth={0.01}
        />
      ))}
    </svg>
  );
}
