import { equivalentMinutes, type CureScale } from '#chemistry/cure/equivalent-minutes.ts';
import type { Trace, TraceRow } from '#chemistry/cure/trace.ts';
import type { TimeUnit } from './csv/layout.ts';
import type { TraceTable } from './csv/read-table.ts';
import type { Unit } from './typed.ts';

const minutesPer: Record<TimeUnit, number> = {
  ms: 1 / 60_000,
  s: 1 / 60,
  min: 1,
  h: 60,
  'hh:mm': 1 / 60,
  'mm:ss': 1 / 3600,
};

export type TraceChoice = {
  /** Place of a column, or the coldest reading of every moment: the film is cured where its coldest spot is. */
  column: number | 'coldest';
  /** Unit of columns that name none, or of all where it was set by hand. */
  unit: Unit | null;
  time: TimeUnit;
};

export type ChosenTrace = {
  trace: Trace;
  /** The hottest reading of any chosen column; a limit is broken by the hottest spot. */
  hottestCelsius: number | null;
};

/** Unit a column is read in: set by hand, else named in the file, else Celsius. */
export const unitOf = (column: { unit: Unit | null } | undefined, byHand: Unit | null): Unit =>
  byHand ?? column?.unit ?? 'C';

/** The trace that is judged, in minutes from its first row. */
export function traceOf(table: TraceTable, choice: TraceChoice): ChosenTrace {
  const columns = choice.column === 'coldest' ? table.columns : table.columns.slice(choice.column, choice.column + 1);
  const read = columns.map((column) => ({ values: column.values, fahrenheit: unitOf(column, choice.unit) === 'F' }));
  const factor = minutesPer[choice.time];
  const start = table.time[0] ?? 0;
  const trace: TraceRow[] = [];
  let hottestCelsius: number | null = null;
  for (let row = 0; row < table.rows; row += 1) {
    let [coldest, missing] = [Infinity, false];
    for (const { values, fahrenheit } of read) {
      const value = values[row] ?? NaN;
      if (Number.isNaN(value)) {
        missing = true;
        continue;
      }
      const celsius = fahrenheit ? (value - 32) / 1.8 : value;
      if (celsius < coldest) coldest = celsius;
      if (hottestCelsius === null || celsius > hottestCelsius) hottestCelsius = celsius;
    }
    // Where one sensor is silent nobody knows the coldest; the warmer rest must not stand in for it.
    if (!missing) trace.push({ minutes: ((table.time[row] ?? 0) - start) * factor, metalCelsius: coldest });
  }
  return { trace, hottestCelsius };
}

export type CurePoint = { minutes: number; done: number };

/** Cure earned up to a few hundred moments along a trace, in minutes at the reference temperature. Never falls. */
export function cureCurve(trace: Trace, kinetics: CureScale, earlier: number, moments = 300): CurePoint[] {
  const first = trace[0];
  if (!first) return [];
  const curve = [{ minutes: first.minutes, done: earlier }];
  const each = Math.max(1, Math.ceil((trace.length - 1) / moments));
  let done = earlier;
  for (let at = 0; at < trace.length - 1; at += each) {
    const stretch = trace.slice(at, at + each + 1);
    done += equivalentMinutes(stretch, kinetics);
    curve.push({ minutes: stretch.at(-1)?.minutes ?? first.minutes, done });
  }
  return curve;
}

/** When the curve reaches what the sheet asks, to a straight line between its points; null: not in this bake. */
export function curedAtMinute(curve: readonly CurePoint[], needed: number): number | null {
  let before = curve[0];
  for (const point of curve) {
    if (before && point.done >= needed) {
      const rise = point.done - before.done;
      return rise > 0
        ? before.minutes + ((needed - before.done) / rise) * (point.minutes - before.minutes)
        : point.minutes;
    }
    before = point;
  }
  return null;
}
