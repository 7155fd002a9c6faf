import * as z from 'zod';
import { newJob, type Job } from '#contracts/jobs.ts';
import type { Reader } from '#src/lib/formats.ts';
import { readCelsius, readDateTime, readMinutes, typeCelsius, typeDateTime, type Read } from './typed.ts';

const dateTime = z.object({ day: z.string(), time: z.string() });

/** What can be said of a job when it is made and changed later, as typed. */
export const jobFacts = z.object({
  title: z.string(),
  vehicle: z.string(),
  colourNote: z.string(),
  notes: z.string(),
  release: dateTime,
  promise: dateTime,
  weight: z.number(),
  electric: z.boolean(),
  heatLimit: z.string(),
  heatMinutes: z.string(),
});
export type JobFacts = z.output<typeof jobFacts>;
export type Fault = (message: string, ...path: (string | number)[]) => void;

const contract = newJob.omit({ id: true, sheetId: true, options: true, parts: true });
export type FactValues = z.output<typeof contract>;

/** A promise without a time means the end of the afternoon, an arrival the start of the day. Minutes after midnight. */
const usual = { release: 8 * 60, promise: 16 * 60 };

/** The facts as the server takes them, or null after telling every fault. */
export function readFacts(form: JobFacts, reader: Reader, tell: Fault): FactValues | null {
  let isGood = true;
  const fault: Fault = (...given) => {
    isGood = false;
    tell(...given);
  };
  const take = <T>(read: Read<T>, field: string): T | null => {
    if ('value' in read) return read.value;
    fault(read.fault, field);
    return null;
  };
  const releaseAt = take(readDateTime(form.release, reader.zone, usual.release), 'release');
  const promiseAt = take(readDateTime(form.promise, reader.zone, usual.promise), 'promise');
  if (form.release.day === '' && form.release.time.trim() === '') fault('When does it arrive?', 'release');
  if (releaseAt !== null && promiseAt !== null && promiseAt < releaseAt)
    fault('The promise lies before the job arrives.', 'promise');
  const parsed = contract.safeParse({
    title: form.title,
    vehicle: form.vehicle,
    colourNote: form.colourNote,
    notes: form.notes,
    weight: form.weight,
    electric: form.electric,
    releaseAt: releaseAt ?? new Date(0).toISOString(),
    promiseAt,
    // A limit belongs to the battery: without one what was typed there does not count.
    ...(form.electric ? heat(form, reader, take) : { heatLimitCelsius: null, heatLimitMinutes: null }),
  });
  for (const { path } of parsed.error?.issues ?? []) fault(faultWords(String(path[0])), String(path[0]));
  return isGood && parsed.success ? parsed.data : null;
}

const heat = (form: JobFacts, reader: Reader, take: <T>(read: Read<T>, field: string) => T | null) => ({
  heatLimitCelsius: take(readCelsius(form.heatLimit, reader.unit, { min: 20, max: 120 }), 'heatLimit'),
  heatLimitMinutes: take(readMinutes(form.heatMinutes, { min: 1, max: 1440 }), 'heatMinutes'),
});

function faultWords(field: string): string {
  if (field === 'title') return 'Give the job a title of at most 160 characters.';
  if (field === 'vehicle') return 'At most 160 characters.';
  if (field === 'colourNote' || field === 'notes') return 'At most 4000 characters.';
  return 'This cannot be taken as it is.';
}

/** A job's facts as they would be typed. */
export const typeFacts = (job: Job, reader: Reader): JobFacts => ({
  title: job.title,
  vehicle: job.vehicle,
  colourNote: job.colourNote,
  notes: job.notes,
  release: typeDateTime(job.releaseAt, reader),
  promise: typeDateTime(job.promiseAt, reader),
  weight: job.weight,
  electric: job.electric,
  heatLimit: typeCelsius(job.heatLimitCelsius, reader.unit),
  heatMinutes: job.heatLimitMinutes === null ? '' : String(job.heatLimitMinutes),
});

const named = {
  title: 'title',
  vehicle: 'vehicle',
  colourNote: 'colourNote',
  notes: 'notes',
  release: 'releaseAt',
  promise: 'promiseAt',
  weight: 'weight',
  electric: 'electric',
  heatLimit: 'heatLimitCelsius',
  heatMinutes: 'heatLimitMinutes',
} as const satisfies Record<keyof JobFacts, keyof FactValues>;

/**
 * Only what was typed over: what stands in the form as it was is not sent, so that it cannot undo what somebody else
 * did to it, nor move a figure by the rounding of its writing.
 */
export function changedFacts(before: JobFacts, after: JobFacts, values: FactValues): Partial<FactValues> {
  const changed = (Object.keys(named) as (keyof JobFacts)[]).filter((field) => {
    if (JSON.stringify(before[field]) !== JSON.stringify(after[field])) return true;
    return (field === 'heatLimit' || field === 'heatMinutes') && before.electric !== after.electric;
  });
  return Object.fromEntries(changed.map((field) => [named[field], values[named[field]]]));
}

/** The facts' schema for a form that changes a job. */
export const factsSchema = (reader: Reader) =>
  jobFacts.transform((form, context): FactValues => {
    const fault: Fault = (message, ...path) => context.addIssue({ code: 'custom', message, path });
    return readFacts(form, reader, fault) ?? z.NEVER;
  });
