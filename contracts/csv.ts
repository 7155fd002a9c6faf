import * as z from 'zod';

/** What a list's CSV import takes: the file's text. `tryOnly`: nothing is written, the report is made all the same. */
export const csvImport = z.strictObject({ csv: z.string().max(900_000), tryOnly: z.boolean() });

/** A line that cannot be taken. `line` counts from 1, the header being 1; `column` is the header's word, null: the line. */
export const csvFault = z.strictObject({ line: z.number().int(), column: z.string().nullable(), message: z.string() });
export type CsvFault = z.output<typeof csvFault>;

/** All lines are taken or none: with a fault anywhere `added` and `changed` are 0 and nothing was written. */
export const csvReport = z.strictObject({
  lines: z.number().int(),
  added: z.number().int(),
  changed: z.number().int(),
  faults: z.array(csvFault),
});
export type CsvReport = z.output<typeof csvReport>;

/** A list as a file. The text begins with no byte order mark; who saves it adds one. */
export const csvExport = z.strictObject({ fileName: z.string(), csv: z.string() });
