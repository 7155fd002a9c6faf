import { finite, QuantityError, temperature } from '#chemistry/quantity.ts';

/** One reading of a logger or one corner of a planned bake. Between two rows the temperature runs in a straight line. */
export type TraceRow = { minutes: number; metalCelsius: number };

/** Rows in the order of time. Two rows at the same minute are a step, and weigh nothing. */
export type Trace = readonly TraceRow[];

/** @throws QuantityError naming the row (counted from 1) that is no number, too cold to be, or earlier than the one before */
export function checkTrace(trace: Trace): void {
  let before = -Infinity;
  for (const [index, row] of trace.entries()) {
    // The words are put together only for a bad row: a long trace is checked in one quick pass.
    if (!(row.minutes >= before) || !Number.isFinite(row.minutes)) {
      finite(`minutes of row ${index + 1}`, row.minutes);
      throw new QuantityError(`minutes of row ${index + 1}`, row.minutes, `at least the row before's ${before}`);
    }
    if (!(row.metalCelsius > -273 && row.metalCelsius < 1000)) {
      temperature(`metalCelsius of row ${index + 1}`, row.metalCelsius);
    }
    before = row.minutes;
  }
}

/** A bake that holds one temperature. */
export function hold(metalCelsius: number, minutes: number): Trace {
  return [
    { minutes: 0, metalCelsius },
    { minutes, metalCelsius },
  ];
}
