import type * as z from 'zod';
import type { CsvFault } from '#contracts/csv.ts';
import { headerOf, sameHeader, unescapeCell } from './cells.ts';
import { split, type RawLine } from './split.ts';

const mostLines = 5_000;
/** Enough to see what is wrong; a file in which every cell is wrong would make a report of megabytes. */
const mostFaults = 500;

export type ReadRow<T> = { line: number; value: T };
/** With a fault anywhere nothing may be taken; `rows` then holds the lines that are right by themselves. */
export type ReadRows<T> = {
  lines: number;
  rows: ReadRow<T>[];
  faults: CsvFault[];
  /** Keys whose column the file has: what it does not speak of it need not change. */
  columns: ReadonlySet<string>;
};

/**
 * Reads a file of rows by its header. The schema's keys are the columns (`goodUntil` is found under `good until`, `Good
 * Until`, `good_until`); an empty cell is undefined, so what may be empty is `.optional()` or has a default. Columns that
 * are needed and missing, unknown or there twice are faults of line 1: nothing is passed over in silence.
 */
export function readRows<S extends z.ZodObject>(text: string, schema: S): ReadRows<z.output<S>> {
  const keys = new Map(Object.keys(schema.shape).map((key) => [sameHeader(headerOf(key)), key]));
  const file = split(text, (header) => keys.has(sameHeader(unescapeCell(header))));
  if ('fault' in file) return { ...nothing, faults: [file.fault] };
  const [head, ...body] = file.lines;
  if (!head) return onlyFault(0, 'The file is empty. Its first line names the columns.');
  if (body.length > mostLines)
    return onlyFault(body.length, `The file has ${body.length} lines; ${mostLines} can be taken at once. Divide it.`);
  const columns = readHead(head, keys, schema);
  if (columns.faults.length > 0) return { ...nothing, lines: body.length, faults: columns.faults };
  const rows: ReadRow<z.output<S>>[] = [];
  const faults: CsvFault[] = [];
  for (const line of body) {
    const read = readLine(line, columns.named, schema);
    if ('value' in read) rows.push({ line: line.line, value: read.value });
    else faults.push(...read.faults);
    if (faults.length >= mostFaults) break;
  }
  const named = new Set(columns.named.flatMap((column) => column?.key ?? []));
  return { lines: body.length, rows, faults, columns: named };
}

const nothing = { lines: 0, rows: [], columns: new Set<string>() };

const onlyFault = (lines: number, message: string): ReadRows<never> => ({
  ...nothing,
  lines,
  faults: [{ line: 1, column: null, message }],
});

/** A column: the header's own word and the key it stands for. */
type Column = { header: string; key: string };

function readHead(head: RawLine, keys: Map<string, string>, schema: z.ZodObject) {
  const faults: CsvFault[] = [];
  const named: (Column | null)[] = [];
  const say = (column: string, message: string) => faults.push({ line: head.line, column, message });
  for (const cell of head.cells) {
    const header = unescapeCell(cell).trim();
    const key = keys.get(sameHeader(header));
    // Spreadsheets save empty columns at the right.
    if (header === '') named.push(null);
    else if (key === undefined) say(header, `This column is not known. Known are: ${knownHeaders(schema)}.`);
    else if (named.some((column) => column?.key === key)) say(header, 'This column is here twice.');
    else named.push({ header, key });
  }
  for (const [key, field] of Object.entries(schema.shape) as [string, z.ZodType][])
    if (!named.some((column) => column?.key === key) && !field.safeParse(undefined).success)
      say(headerOf(key), 'This column is missing.');
  return { named, faults };
}

const knownHeaders = (schema: z.ZodObject): string => Object.keys(schema.shape).map(headerOf).join(', ');

function readLine<S extends z.ZodObject>(
  { line, cells }: RawLine,
  columns: (Column | null)[],
  schema: S,
): { value: z.output<S> } | { faults: CsvFault[] } {
  const extra = cells.slice(columns.length).some((cell) => cell.trim() !== '');
  if (extra || columns.some((column, at) => column === null && (cells[at] ?? '').trim() !== ''))
    return { faults: [{ line, column: null, message: 'There are more cells than columns.' }] };
  const given: Record<string, string> = {};
  columns.forEach((column, at) => {
    const cell = unescapeCell((cells[at] ?? '').trim());
    if (column && cell !== '') given[column.key] = cell;
  });
  const read = schema.safeParse(given);
  if (read.success) return { value: read.data };
  // One word on a cell is enough: the first.
  const first = new Map(read.error.issues.toReversed().map((issue) => [issue.path[0], issue]));
  const faults = [...first.values()].toReversed().map((issue) => {
    const key = issue.path[0];
    const header = columns.find((column) => column?.key === key)?.header ?? null;
    const isEmpty = typeof key === 'string' && given[key] === undefined && issue.code === 'invalid_type';
    return { line, column: header, message: isEmpty ? 'This must be filled in.' : issue.message };
  });
  return { faults };
}
