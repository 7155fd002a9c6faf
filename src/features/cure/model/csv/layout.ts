import { cellsOf, guessDelimiter, reading, type Delimiter } from './cells.ts';
import { momentOf, type DateOrder, type Moment } from './times.ts';

export type TimeUnit = 'ms' | 's' | 'min' | 'h' | 'mm:ss' | 'hh:mm';
export type Layout = {
  delimiter: Delimiter;
  /** Lines counted from 0. */
  dataLine: number;
  time: {
    column: number;
    name: string;
    kind: Moment['kind'];
    unit: TimeUnit;
    order: DateOrder;
    clockColumn: number | null;
  };
  columns: { column: number; name: string; unit: 'C' | 'F' | null }[];
};

const indexHeader = /^(#|no\.?|nr\.?|idx|index|row|sample|scan|n|record|id)$/i;
const timeHeader = /time|elapsed|date|zeit|tijd|temps|^t$|\b(sec|min|hour)/i;
const noTemperature = /%|humid|\brh\b|bar\b|volt|\bv\b|pressure/i;
const unitCell = /^(\[?\(?)(°?\s*[CF]|deg\.?\s*[CF]|s|sec|min|h|ms|hh:mm(:ss)?|mm:ss|-)?(\)?\]?)$/i;

/**
 * Finds its way in a logger's file: the sign that parts the cells, lines before the readings, which column is the time and
 * which are temperatures. `lines`: the first few hundred; `end`: the last few, by which an ambiguous date is told. Null where no line has a time and a reading that goes on in the next.
 */
export function guessLayout(lines: readonly string[], end: readonly string[] = []): Layout | null {
  // The readings, not what a logger writes above them, show how cells are parted.
  const delimiter = guessDelimiter(lines.slice(-Math.ceil(lines.length / 2)));
  const filled = lines
    .map((line, at) => ({ at, cells: cellsOf(line, delimiter) }))
    .filter(({ cells }) => cells.some((cell) => cell !== ''));
  for (const [i, { at, cells }] of filled.entries()) {
    const above = filled.slice(0, i).map((line) => line.cells);
    const names = headerOf(above, cells.length);
    const time = timeColumnOf(cells, names);
    if (!time) continue;
    const below = filled.slice(i, i + 20).map((line) => line.cells);
    const next = below[1];
    if (next && anyMoment(next[time.column] ?? '')?.kind !== time.kind) continue;
    const last = Math.max(time.column, time.clockColumn ?? 0);
    const columns = temperatureColumns(below, names, last, above.flat().join(' '));
    if (columns.length === 0) continue;
    const name = names[time.column] || `Column ${time.column + 1}`;
    const ends = end.map((line) => cellsOf(line, delimiter));
    const order = dateOrder([...below, ...ends].map((row) => row[time.column] ?? ''));
    return { delimiter, dataLine: at, time: { ...time, name, unit: timeUnit(name, time.kind), order }, columns };
  }
  return null;
}

/** Names from the line above the readings; a line of units alone is joined to the names above it. */
function headerOf(above: readonly string[][], width: number): string[] {
  const last = above.at(-1) ?? [];
  if (last.length < 2 || last.length < width - 1) return [];
  const names = above.at(-2) ?? [];
  if (!last.every((cell) => unitCell.test(cell)) || names.length < 2) return last;
  return last.map((unit, i) => `${names[i] ?? ''} ${unit}`.trim());
}

const anyMoment = (cell: string) => momentOf(cell) ?? momentOf(cell, 'month-first');

type Found = { column: number; kind: Moment['kind']; clockColumn: number | null };

/** A date before a clock before a plain number; a date and a clock side by side belong together. */
function timeColumnOf(cells: readonly string[], names: readonly string[]): Found | null {
  const moments = cells.map(anyMoment);
  const of = (kind: Moment['kind']) => moments.findIndex((moment) => moment?.kind === kind);
  const [date, clock] = [of('date'), of('clock')];
  if (date >= 0) {
    const dateOnly = !(cells[date] ?? '').includes(':');
    return { column: date, kind: 'date', clockColumn: dateOnly && clock >= 0 ? clock : null };
  }
  if (clock >= 0) return { column: clock, kind: 'clock', clockColumn: null };
  const numbers = moments.flatMap((moment, i) => (moment && !indexHeader.test(names[i] ?? '') ? [i] : []));
  const named = numbers.find((i) => timeHeader.test(names[i] ?? ''));
  const column = named ?? numbers[0];
  // A number far to the right that nobody calls a time is a reading.
  if (column === undefined || (named === undefined && column > 1)) return null;
  return { column, kind: 'number', clockColumn: null };
}

function temperatureColumns(rows: readonly string[][], names: readonly string[], after: number, preamble: string) {
  const width = Math.max(...rows.map((row) => row.length));
  const columns: Layout['columns'] = [];
  for (let column = after + 1; column < width; column += 1) {
    const name = names[column] ?? '';
    const cells = rows.map((row) => row[column] ?? '');
    const filled = cells.filter((cell) => cell !== '');
    const readings = filled.filter((cell) => !Number.isNaN(reading(cell)));
    if (noTemperature.test(name) || readings.length === 0 || readings.length * 2 < filled.length) continue;
    const unit = unitIn(name) ?? unitIn(/[CF]$/i.exec(readings[0] ?? '')?.[0] ?? '') ?? unitIn(preamble);
    columns.push({ column, name: name || `Column ${column + 1}`, unit });
  }
  return columns;
}

/** The unit a text names, where it names one only. */
export function unitIn(text: string): 'C' | 'F' | null {
  const fahrenheit = /°\s*F\b|(^|[^A-Za-z])F($|[^A-Za-z])|deg\.?\s*F\b|fahrenheit/i.test(text);
  const celsius = /°\s*C\b|(^|[^A-Za-z])C($|[^A-Za-z])|deg\.?\s*C\b|celsius|centigrade/i.test(text);
  if (fahrenheit === celsius) return null;
  return fahrenheit ? 'F' : 'C';
}

function timeUnit(name: string, kind: Moment['kind']): TimeUnit {
  if (kind === 'clock') return /mm:ss/i.test(name) && !/h:mm/i.test(name) ? 'mm:ss' : 'hh:mm';
  if (kind === 'date') return 's';
  if (/\bms\b|milli/i.test(name)) return 'ms';
  if (/\bmin/i.test(name)) return 'min';
  return /\b(h|hrs?|hours?|std)\b/i.test(name) ? 'h' : 's';
}

const orders: readonly DateOrder[] = ['day-first', 'month-first'];

/** 3/12 may be December. The order that makes sense of most lines; where both do, the one by which the bake is shorter. */
function dateOrder(cells: readonly string[]): DateOrder {
  const [dayFirst, monthFirst] = orders.map((order) => {
    const seconds = cells.flatMap((cell) => momentOf(cell, order)?.seconds ?? []);
    const span = (seconds.at(-1) ?? 0) - (seconds[0] ?? 0);
    return { read: seconds.length, span: span < 0 ? Infinity : span };
  });
  if (!dayFirst || !monthFirst) return 'day-first';
  if (dayFirst.read !== monthFirst.read) return dayFirst.read > monthFirst.read ? 'day-first' : 'month-first';
  return monthFirst.span < dayFirst.span ? 'month-first' : 'day-first';
}
