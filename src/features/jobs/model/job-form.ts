import * as z from 'zod';
import { substrate } from '#contracts/common.ts';
import { newJob, type NewJob } from '#contracts/jobs.ts';
import type { Sheet } from '#contracts/sheets.ts';
import { optionsOn } from '#server/sheets/options.ts';
import type { Reader } from '#src/lib/formats.ts';
import { jobFacts, readFacts, type Fault } from './job-facts.ts';
import { typeDateTime } from './typed.ts';

/** What stands in the form for a new job: everything as typed, so that nothing is lost or turned while one types. */
export const jobForm = jobFacts.extend({
  /** Of the job that will be made. Kept with the form: sent twice, even after a reload, it makes one job. */
  id: z.uuid(),
  sheetId: z.string(),
  options: z.array(z.string()),
  parts: z.array(z.object({ name: z.string(), substrate, units: z.string() })),
});
export type JobForm = z.output<typeof jobForm>;
export const isJobForm = (value: unknown): value is JobForm => jobForm.safeParse(value).success;

/** An empty form: arrives now, on the last five minutes; ordinary weight. */
export const emptyForm = (id: string, now: number, reader: Reader): JobForm => ({
  id,
  sheetId: '',
  options: [],
  parts: [],
  title: '',
  vehicle: '',
  colourNote: '',
  notes: '',
  release: typeDateTime(new Date(Math.floor(now / 300_000) * 300_000).toISOString(), reader),
  promise: { day: '', time: '' },
  weight: 1,
  electric: false,
  heatLimit: '',
  heatMinutes: '',
});

/** What a sheet brings into the form when it is picked. */
export const fromSheet = ({ id, body }: Sheet): Pick<JobForm, 'sheetId' | 'options' | 'parts'> => ({
  sheetId: id,
  options: optionsOn(body),
  parts: body.parts.map((part) => ({ ...part, units: String(part.units) })),
});

const made = newJob.pick({ id: true, sheetId: true, options: true, parts: true });

/** The form as a job the server takes; faults lie at the fields that have them, all at once. */
export const jobFormSchema = (reader: Reader) =>
  jobForm.transform((form, context): NewJob => {
    const fault: Fault = (message, ...path) => context.addIssue({ code: 'custom', message, path });
    const facts = readFacts(form, reader, fault);
    const parsed = made.safeParse({
      id: form.id,
      sheetId: form.sheetId,
      options: form.options,
      parts: form.parts.map((part) => ({ ...part, units: Number(part.units) })),
    });
    for (const { path } of parsed.error?.issues ?? []) fault(faultWords(path.join('.')), ...path.map(step));
    return parsed.success && facts ? { ...parsed.data, ...facts } : z.NEVER;
  });

const step = (key: PropertyKey): string | number => (typeof key === 'symbol' ? String(key) : key);

function faultWords(path: string): string {
  if (path === 'sheetId') return 'Pick a process sheet.';
  if (path === 'parts') return 'A job has 1 to 40 parts.';
  if (path.endsWith('.name')) return 'Name the part.';
  if (path.endsWith('.units')) return '1 to 100.';
  return 'This cannot be taken as it is.';
}

const renamed: Partial<Record<string, string>> = {
  releaseAt: 'release',
  promiseAt: 'promise',
  heatLimitCelsius: 'heatLimit',
  heatLimitMinutes: 'heatMinutes',
};

/** Where in the form a field of the server's answer stands: `body.promiseAt` is `promise`. Null: nowhere in it. */
export function formPath(path: string): string | null {
  const [first = '', ...rest] = path.replace(/^body\./, '').split('.');
  const name = renamed[first] ?? first;
  if (!(name in jobForm.shape)) return null;
  // All options are one field of the form.
  return name === 'options' ? name : [name, ...rest].join('.');
}
