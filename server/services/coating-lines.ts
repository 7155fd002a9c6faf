import * as z from 'zod';
import { coatingKind, coatingSheet, emptySheet, type Coating, type CoatingSheet } from '#contracts/coatings.ts';
import { name } from '#contracts/common.ts';
import type { CsvFault } from '#contracts/csv.ts';
import { headerOf } from '../csv/cells.ts';
import { csvNumber } from '../csv/fields.ts';
import { writeRows, type CsvCell } from '../csv/write-rows.ts';

/** Each column of a file of data sheets and where in the sheet it stands. Minutes, C, metres, percent, kJ/mol. */
const places = {
  maker: ['maker'],
  edition: ['edition'],
  coatsFrom: ['coats', 'from'],
  coatsTo: ['coats', 'to'],
  flashBetweenCoats: ['flashBetweenCoats'],
  flashBeforeNext: ['flashBeforeNext'],
  flashBeforeHeat: ['flashBeforeHeat'],
  recoatWithin: ['recoatWithin'],
  potLife: ['potLife'],
  airMinutes: ['airDry', 'minutes'],
  airCelsius: ['airDry', 'celsius'],
  bakeMinutes: ['bake', 'minutes'],
  bakeCelsius: ['bake', 'celsius'],
  bakeMeasuredAt: ['bake', 'measuredAt'],
  bakeHeatUp: ['bake', 'heatUp'],
  lampShortMinutes: ['lampShort', 'minutes'],
  lampShortMetres: ['lampShort', 'metres'],
  lampMediumMinutes: ['lampMedium', 'minutes'],
  lampMediumMetres: ['lampMedium', 'metres'],
  heatLimitCelsius: ['heatLimitCelsius'],
  holdsFromCelsius: ['holds', 'from'],
  holdsToCelsius: ['holds', 'to'],
  kilojoulesPerMole: ['kilojoulesPerMole'],
  coldBelowCelsius: ['coldAir', 'belowCelsius'],
  coldFactor: ['coldAir', 'factor'],
  dampAbovePercent: ['dampAir', 'abovePercent'],
  dampFactor: ['dampAir', 'factor'],
  cautions: ['cautions'],
} as const satisfies Record<string, readonly [keyof CoatingSheet, string?]>;
type Column = keyof typeof places;
const columns = Object.keys(places) as Column[];

const texts = ['maker', 'edition', 'bakeMeasuredAt', 'cautions'];
const cells = Object.fromEntries(
  columns.map((column) => [column, texts.includes(column) ? z.string().optional() : csvNumber.optional()]),
) as unknown as Record<Column, z.ZodOptional<z.ZodType<string | number>>>;

const kinds = coatingKind.options.join(', ');
export const coatingRow = z.object({
  name,
  kind: z
    .string()
    .toLowerCase()
    .pipe(z.enum(coatingKind.options, `Write one of: ${kinds}.`)),
  ...cells,
});
export type CoatingRow = z.output<typeof coatingRow>;

/** Several cautions in one cell, which may hold commas of their own. */
const divider = ' | ';

export function writeCoatings(coatings: readonly Coating[]): string {
  const rows = coatings.map(({ name, kind, sheet }) => {
    const line = Object.fromEntries(columns.map((column) => [column, cellOf(sheet, column)]));
    return { name, kind, ...(line as Record<Column, CsvCell>) };
  });
  return writeRows(['name', 'kind', ...columns], rows);
}

function cellOf(sheet: CoatingSheet, column: Column): CsvCell {
  const [line, part]: readonly [keyof CoatingSheet, string?] = places[column];
  if (line === 'cautions') return sheet.cautions.join(divider);
  const value = sheet[line];
  if (part === undefined) return value as CsvCell;
  return value === null ? null : ((value as Record<string, CsvCell>)[part] ?? null);
}

/**
 * A line laid over the sheet that is there, or over an empty one. An empty cell takes its figure off; a column that the file
 * does not have leaves it as it was.
 */
export function sheetFrom(
  row: CoatingRow,
  { before = emptySheet, has, line }: { before?: CoatingSheet | undefined; has: ReadonlySet<string>; line: number },
): { sheet: CoatingSheet } | { faults: CsvFault[] } {
  const laid: Record<string, unknown> = { ...before };
  for (const column of columns.filter((one) => has.has(one))) {
    const [key, part]: readonly [keyof CoatingSheet, string?] = places[column];
    laid[key] = part === undefined ? plain(key, row[column]) : withPart(laid[key], part, row[column]);
  }
  const read = coatingSheet.safeParse(laid);
  if (read.success) return { sheet: read.data };
  return { faults: read.error.issues.map((issue) => ({ line, ...columnFault(issue) })) };
}

function plain(key: keyof CoatingSheet, value: string | number | undefined): unknown {
  if (key === 'cautions')
    return String(value ?? '')
      .split('|')
      .map((caution) => caution.trim())
      .filter((caution) => caution !== '');
  // What a sheet must say is missed by the schema; text may be empty.
  return value ?? (key === 'maker' || key === 'edition' ? '' : emptySheet[key] === null ? null : undefined);
}

/** A line of the sheet without any of its figures says nothing. */
function withPart(group: unknown, part: string, value: string | number | undefined): object | null {
  const { [part]: _, ...others } = (group ?? {}) as Record<string, unknown>;
  const all = value === undefined ? others : { ...others, [part]: value };
  return Object.keys(all).length === 0 ? null : all;
}

function columnFault({ path, code, message }: z.core.$ZodIssue): Omit<CsvFault, 'line'> {
  const column = columns.find((one) => {
    const [key, part]: readonly [string, string?] = places[one];
    return key === path[0] && (part === undefined || part === path[1]);
  });
  const isMissing = code === 'invalid_type' && message.endsWith('undefined');
  return { column: column ? headerOf(column) : null, message: isMissing ? 'This must be filled in.' : message };
}
