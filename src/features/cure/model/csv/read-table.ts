import { cellsOf, reading } from './cells.ts';
import { guessLayout, type Layout } from './layout.ts';
import { momentOf, pastMidnight } from './times.ts';

/** A line that was left out, wholly or in one column, and why. Lines counted from 1, as editors do. */
export type BadRow = { line: number; what: string };

export type TraceTable = {
  layout: Layout;
  rows: number;
  /** In seconds, or as the numbers stand; never falling. */
  time: Float64Array;
  /** One per temperature column, as the figures stand; NaN where there is none. */
  columns: { name: string; unit: 'C' | 'F' | null; values: Float64Array }[];
  /** The first of them; `badCount` is how many there were. */
  bad: BadRow[];
  badCount: number;
};

export type ReadResult = { ok: true; table: TraceTable } | { ok: false; what: string };

type Options = {
  signal?: AbortSignal;
  /** Share done, 0 to 1. */
  onProgress?: (share: number) => void;
  /** Lets the page breathe between two slices. */
  breathe?: () => Promise<void>;
};

const linesPerSlice = 1000;
const badKept = 500;
/** No panel in a booth is outside; a broken sensor is. In C or F alike. */
const readingRange = { least: -60, most: 600 };

/**
 * Reads a logger's file slice by slice, so that the page stays alive. Every line that cannot be used is reported; the others
 * count.
 * @throws the signal's reason where it was stopped
 */
export async function readTable(text: string, options: Options = {}): Promise<ReadResult> {
  const { signal, onProgress, breathe = () => new Promise((done) => setTimeout(done)) } = options;
  const lines = text.split(text.includes('\n') ? '\n' : '\r');
  if (text.trim() === '') return { ok: false, what: 'The file is empty.' };
  const layout = guessLayout(lines.slice(0, 300), lines.slice(-20));
  if (!layout) {
    const what = 'No line has a time and a temperature. It needs one column of times and at least one of temperatures.';
    return { ok: false, what };
  }
  const table = emptyTable(layout, lines.length - layout.dataLine);
  const carry = { seconds: 0, raw: -Infinity };
  for (let at = layout.dataLine; at < lines.length; at += linesPerSlice) {
    signal?.throwIfAborted();
    const end = Math.min(at + linesPerSlice, lines.length);
    for (let i = at; i < end; i += 1) readLine(table, lines[i] ?? '', i + 1, carry);
    onProgress?.(end / lines.length);
    if (end < lines.length) await breathe();
  }
  signal?.throwIfAborted();
  if (table.rows < 2)
    return { ok: false, what: 'Fewer than two lines could be used, so there is no time between them.' };
  return { ok: true, table: trimmed(table) };
}

type Carry = { seconds: number; raw: number };

function readLine(table: TraceTable, line: string, number: number, carry: Carry): void {
  if (line.trim() === '') return;
  const { layout } = table;
  const cells = cellsOf(line, layout.delimiter);
  const report = (what: string) => {
    table.badCount += 1;
    if (table.bad.length < badKept) table.bad.push({ line: number, what });
  };
  const seconds = secondsOf(cells, layout, carry);
  if (typeof seconds === 'string') return report(seconds);
  const before = table.rows > 0 ? (table.time[table.rows - 1] ?? 0) : -Infinity;
  if (seconds < before) return report('The time goes back; the line was left out.');
  const faults: string[] = [];
  let readings = 0;
  for (const [i, { column, name }] of layout.columns.entries()) {
    const found = readingOf(cells[column] ?? '');
    const values = table.columns[i]?.values;
    if (values) values[table.rows] = typeof found === 'number' ? found : NaN;
    if (typeof found === 'number') readings += 1;
    else faults.push(`${name}: ${found}`);
  }
  if (faults.length > 0) report(faults.join('; '));
  if (readings === 0) return;
  table.time[table.rows] = seconds;
  table.rows += 1;
}

function secondsOf(cells: readonly string[], { time }: Layout, carry: Carry): number | string {
  const own = cells[time.column] ?? '';
  const cell = time.clockColumn === null ? own : `${own} ${cells[time.clockColumn] ?? ''}`;
  const moment = momentOf(cell, time.order);
  if (moment === null || moment.kind !== time.kind) {
    return cell.trim() === '' ? 'No time.' : `“${shortened(cell)}” is no time like those above it.`;
  }
  if (moment.kind !== 'clock') return moment.seconds;
  carry.seconds += pastMidnight(carry.raw, moment.seconds);
  carry.raw = moment.seconds;
  return moment.seconds + carry.seconds;
}

function readingOf(cell: string): number | string {
  if (cell === '') return 'no reading';
  const value = reading(cell);
  if (Number.isNaN(value)) return `“${shortened(cell)}” is no number`;
  const { least, most } = readingRange;
  return value < least || value > most ? `${shortened(cell)} is no temperature of a panel` : value;
}

const shortened = (text: string) => (text.length > 24 ? `${text.slice(0, 24)}…` : text);

function emptyTable(layout: Layout, rows: number): TraceTable {
  const columns = layout.columns.map(({ name, unit }) => ({ name, unit, values: new Float64Array(rows) }));
  return { layout, rows: 0, time: new Float64Array(rows), columns, bad: [], badCount: 0 };
}

function trimmed(table: TraceTable): TraceTable {
  const columns = table.columns.map((column) => ({ ...column, values: column.values.slice(0, table.rows) }));
  return { ...table, time: table.time.slice(0, table.rows), columns };
}
