export type Point = { x: number; y: number };
export type Span = { from: number; to: number };

/** Maps values to pixels; a span without length is widened, so that a level line is drawn in the middle. */
export function scale(values: Span, pixels: Span): (value: number) => number {
  const { from, to } = values.to > values.from ? values : { from: values.from - 1, to: values.from + 1 };
  return (value) => pixels.from + ((value - from) / (to - from)) * (pixels.to - pixels.from);
}

/** Round figures (1, 2 or 5 times a power of ten) within the span, about `wanted` of them. */
export function ticks({ from, to }: Span, wanted: number): number[] {
  if (!(to > from)) return [from];
  const rough = (to - from) / Math.max(1, wanted);
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = [1, 2, 5, 10].map((of) => of * power).find((size) => size >= rough) ?? power * 10;
  const first = Math.ceil(from / step - 1e-9);
  const last = Math.floor(to / step + 1e-9);
  // Rounded, since 3 * 0.1 is not 0.3.
  return Array.from({ length: last - first + 1 }, (_, i) => Number(((first + i) * step).toPrecision(12)));
}

/** From the least to the largest of all, with a little air above and below. */
export function spanOf(values: Iterable<number>, air = 0.06): Span {
  let [from, to] = [Infinity, -Infinity];
  for (const value of values) {
    if (value < from) from = value;
    if (value > to) to = value;
  }
  if (from > to) return { from: 0, to: 1 };
  const room = (to - from || 1) * air;
  return { from: from - room, to: to + room };
}

export const pathOf = (points: readonly Point[]): string =>
  points.map(({ x, y }, i) => `${i === 0 ? 'M' : 'L'}${x.toFixed(1)} ${y.toFixed(1)}`).join('');

/**
 * At most about `2 * columns` points that draw the same line: of every column the lowest and the highest, in their order,
 * and both ends. Peaks are never lost.
 */
export function thinned(points: readonly Point[], columns: number): readonly Point[] {
  if (points.length <= 2 * columns) return points;
  const kept: Point[] = [];
  for (let column = 0; column < columns; column += 1) {
    const start = Math.floor((column * points.length) / columns);
    const end = Math.floor(((column + 1) * points.length) / columns);
    let [low, high] = [start, start];
    for (let i = start; i < end; i += 1) {
      if ((points[i]?.y ?? 0) < (points[low]?.y ?? 0)) low = i;
      if ((points[i]?.y ?? 0) > (points[high]?.y ?? 0)) high = i;
    }
    for (const i of [...new Set([Math.min(low, high), Math.max(low, high)])]) kept.push(points[i] as Point);
  }
  const ends = [points[0], points.at(-1)] as [Point, Point];
  if (kept[0] !== ends[0]) kept.unshift(ends[0]);
  if (kept.at(-1) !== ends[1]) kept.push(ends[1]);
  return kept;
}
