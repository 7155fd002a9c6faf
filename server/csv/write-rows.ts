import { stringify } from 'csv-stringify/sync';
import { escapeCell, headerOf } from './cells.ts';

export type CsvCell = string | number | boolean | readonly string[] | null;

/**
 * Rows as a file that `readRows` takes back unchanged: comma, CR LF (RFC 4180), the keys as headers, `; ` between the words
 * of a list, yes and no, nothing for null. Text a spreadsheet would run as a formula stands behind an apostrophe.
 */
export function writeRows<K extends string>(keys: readonly K[], rows: readonly Record<K, CsvCell>[]): string {
  const lines = rows.map((row) => keys.map((key) => escapeCell(cellText(row[key]))));
  return stringify([keys.map(headerOf), ...lines], { record_delimiter: 'windows', quoted_match: /[;\t\r\n]|^\s|\s$/ });
}

function cellText(cell: CsvCell): string {
  if (cell === null) return '';
  if (typeof cell === 'string') return cell;
  if (typeof cell === 'boolean') return cell ? 'yes' : 'no';
  return typeof cell === 'number' ? String(cell) : cell.join('; ');
}
