import { fractionAt, type Axis } from './axis.ts';
import { loadsOf } from './items.ts';
import type { DayView } from '#contracts/day.ts';

/** From `at` (ms) on the lamps of the circuit draw that many kilowatts together. */
export type LoadStep = { at: number; kilowatts: number };

/** Steps of a circuit's load over time, first to last; nothing before the first, and the last is always 0. */
export function loadSteps(view: DayView, circuitId: string): LoadStep[] {
  const power = new Map(view.rows.filter((row) => row.circuitId === circuitId).map((row) => [row.id, row.kilowatts]));
  const change = new Map<number, number>();
  const add = (at: string, kilowatts: number) =>
    change.set(Date.parse(at), (change.get(Date.parse(at)) ?? 0) + kilowatts);
  for (const [head] of loadsOf(view.bars)) {
    const kilowatts = head.lampIds.reduce((sum, lamp) => sum + (power.get(lamp) ?? 0), 0);
    if (kilowatts === 0) continue;
    for (const phase of head.phases.filter((p) => p.lamp)) {
      add(phase.from, kilowatts);
      add(phase.to, -kilowatts);
    }
  }
  let sum = 0;
  const steps = [...change].sort(([a], [b]) => a - b);
  return steps.flatMap(([at, by]) => {
    if (Math.abs(by) < 1e-9) return [];
    sum += by;
    return [{ at, kilowatts: Math.abs(sum) < 1e-9 ? 0 : sum }];
  });
}

/** The most drawn at once, and whether that is more than the circuit carries. */
export function peakOf(steps: readonly LoadStep[], limit: number): { kilowatts: number; over: boolean } {
  const kilowatts = Math.max(0, ...steps.map((step) => step.kilowatts));
  return { kilowatts, over: kilowatts > limit + 1e-9 };
}

/** Full height of the strip in kilowatts: the limit with a little air, or the peak where that is higher. */
export const stripTop = (steps: readonly LoadStep[], limit: number): number =>
  Math.max(limit, peakOf(steps, limit).kilowatts) * 1.15 || 1;

const size = { width: 1000, height: 100 };
const round = (value: number) => Math.round(value * 100) / 100;

/** Outline of the load as an SVG path in a 1000 by 100 box, closed along the bottom. Empty where nothing burns. */
export function loadPath(steps: readonly LoadStep[], axis: Axis, top: number): string {
  if (steps.length === 0) return '';
  const y = (kilowatts: number) => round(size.height * (1 - kilowatts / top));
  const corners = steps.map(({ at, kilowatts }) => `H${round(size.width * fractionAt(axis, at))}V${y(kilowatts)}`);
  return `M0 ${size.height}${corners.join('')}H${size.width}V${size.height}Z`;
}
