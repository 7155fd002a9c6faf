import type { Job } from '#contracts/jobs.ts';
import { weightOf } from './weights.ts';

/** How instants and temperatures are said: the shop's zone, the reader's clock and unit. */
export type Say = { moment: (iso: string) => string; temperature: (celsius: number) => string };

const fields = {
  title: 'title',
  vehicle: 'vehicle',
  colourNote: 'colour note',
  notes: 'notes',
  releaseAt: 'arrival',
  promiseAt: 'promise',
  weight: 'weight',
  electric: 'high-voltage battery',
  heatLimitCelsius: 'heat limit',
  heatLimitMinutes: 'minutes at the heat limit',
} as const;
export type Field = keyof typeof fields;
export type Difference = { field: Field; label: string; from: string; to: string };

const isField = (name: string): name is Field => name in fields;

/** A field's value as one would say it. Values come from a job or from its history, where nothing is certain. */
export function sayValue(field: Field, value: unknown, say: Say): string {
  if (value === null || value === undefined || value === '') return 'nothing';
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value === 'number') {
    if (field === 'weight') return weightOf(value).word.toLowerCase();
    return field === 'heatLimitCelsius' ? say.temperature(value) : String(value);
  }
  if (typeof value !== 'string') return 'something else';
  return field === 'releaseAt' || field === 'promiseAt' ? say.moment(value) : `“${shortened(value)}”`;
}

const shortened = (text: string) => (text.length > 80 ? `${text.slice(0, 79).trimEnd()}…` : text);

/** What is different between two looks at the same fields, in the order of the page. */
export function differences(before: Record<string, unknown>, after: Record<string, unknown>, say: Say): Difference[] {
  return Object.keys(fields).flatMap((field): Difference[] => {
    if (!isField(field) || !(field in after) || same(before[field], after[field])) return [];
    const from = sayValue(field, before[field], say);
    return [{ field, label: fields[field], from, to: sayValue(field, after[field], say) }];
  });
}

/** What somebody else changed since a job was seen. */
export const changedSince = (seen: Job, current: Job, say: Say): Difference[] => differences(seen, current, say);

/** Instants may be written with other endings and still be the same. */
function same(a: unknown, b: unknown): boolean {
  if (a === b) return true;
  if (typeof a !== 'string' || typeof b !== 'string') return false;
  return /^\d{4}-\d\d-\d\dT/.test(a) && Date.parse(a) === Date.parse(b);
}
