import { CsvError, parse } from 'csv-parse/sync';
import type { CsvFault } from '#contracts/csv.ts';

/** A line as it stands in the file. `line`: where it begins, counted from 1. */
export type RawLine = { line: number; cells: string[] };

const delimiters = [',', ';', '\t'] as const;

/**
 * Text to lines of cells. Comma, semicolon or tab: whichever makes most known headers of the first line. A byte order mark
 * and empty lines are passed over.
 */
export function split(text: string, isKnown: (header: string) => boolean): { lines: RawLine[] } | { fault: CsvFault } {
  try {
    return { lines: numbered(read(text, delimiterOf(text, isKnown))) };
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    const line = Number((error as CsvError & { lines?: unknown }).lines ?? 1);
    return { fault: { line, column: null, message: says(error.code) } };
  }
}

type Parsed = { record: string[]; info: { lines: number } };

const read = (text: string, delimiter: string, to?: number): Parsed[] =>
  parse(text, {
    delimiter,
    bom: true,
    info: true,
    skip_empty_lines: true,
    relax_column_count: true,
    ...(to === undefined ? {} : { to }),
  }) as unknown as Parsed[];

function delimiterOf(text: string, isKnown: (header: string) => boolean): string {
  let best: { delimiter: string; known: number; columns: number } = { delimiter: ',', known: -1, columns: 0 };
  for (const delimiter of delimiters) {
    const columns = read(text, delimiter, 1)[0]?.record ?? [];
    const known = columns.filter(isKnown).length;
    if (known > best.known || (known === best.known && columns.length > best.columns))
      best = { delimiter, known, columns: columns.length };
  }
  return best.delimiter;
}

/** The parser says where a record ends, and counts a CR LF inside quotes as two lines. */
function numbered(parsed: Parsed[]): RawLine[] {
  let counted = 0;
  return parsed.map(({ record, info }) => {
    const inside = record.join('').match(/[\r\n]/g)?.length ?? 0;
    const line = info.lines - counted - inside;
    counted += record.join('').match(/\r\n/g)?.length ?? 0;
    return { line, cells: record };
  });
}

function says(code: string): string {
  if (code === 'CSV_QUOTE_NOT_CLOSED') return 'A quotation mark is opened here and never closed.';
  if (code === 'CSV_MAX_RECORD_SIZE') return 'This line is too long.';
  return 'A quotation mark stands inside a cell. Put the whole cell in quotation marks and write each one inside twice.';
}
