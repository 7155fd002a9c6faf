import { dewPointCelsius } from '#chemistry/air/dew-point.ts';
import type { Reading } from '#contracts/air.ts';

export type ChartPoint = { at: number; value: number };
export type Series = { name: string; points: ChartPoint[] };

/** Dew point and what the surface is over it; the air's temperature stands in for a surface nobody measured. */
export function dewOf(reading: Pick<Reading, 'celsius' | 'humidity' | 'surfaceCelsius'>) {
  if (reading.humidity === 0) return { dewPoint: null, margin: null };
  const dewPoint = dewPointCelsius({ airCelsius: reading.celsius, relativeHumidityPercent: reading.humidity });
  return { dewPoint, margin: (reading.surfaceCelsius ?? reading.celsius) - dewPoint };
}

export const pointsOf = (readings: readonly Reading[], value: (reading: Reading) => number | null): ChartPoint[] =>
  readings.flatMap((reading) => {
    const found = value(reading);
    return found === null ? [] : [{ at: Date.parse(reading.at), value: found }];
  });

/** Where more time passes between two readings than this, nothing is drawn across: nobody knows what was in between. */
export const longestGap = (from: number, to: number): number => Math.max(2 * 3_600_000, (to - from) / 24);

/** Stretches of points without a hole. */
export function stretches(points: readonly ChartPoint[], gap: number): ChartPoint[][] {
  const parts: ChartPoint[][] = [];
  for (const point of points) {
    const last = parts.at(-1);
    const before = last?.at(-1);
    if (last && before && point.at - before.at <= gap) last.push(point);
    else parts.push([point]);
  }
  return parts;
}

/** From the least to the largest of all with air around, at least `least` high, on round figures. */
export function valueSpan(values: readonly number[], least: number): { from: number; to: number; step: number } {
  const [low, high] = values.length > 0 ? [Math.min(...values), Math.max(...values)] : [0, least];
  const middle = (low + high) / 2;
  const half = Math.max(high - low, least) / 2;
  const rough = (2 * half) / 4;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = [1, 2, 5, 10].map((of) => of * power).find((size) => size >= rough) ?? power * 10;
  return { from: Math.floor((middle - half) / step) * step, to: Math.ceil((middle + half) / step) * step, step };
}
