import { isDeepStrictEqual } from 'node:util';
import { Refusal } from '../errors.ts';

/** Fields of which each may be given or not. */
export type Given<Fields> = { [K in keyof Fields]?: Fields[K] | undefined };

/** Only what is given and not as it was. */
export function differing<Fields extends object>(before: Fields, given: Given<Fields>): Partial<Fields> {
  const changed = Object.entries(given).filter(
    ([field, value]) => value !== undefined && !isDeepStrictEqual(value, before[field as keyof Fields]),
  );
  return Object.fromEntries(changed) as Partial<Fields>;
}

/** For the shop's history: what was and what is, of the fields that changed. */
export const beforeAndAfter = <Fields extends object>(before: Fields, fields: Partial<Fields>) => ({
  before: Object.fromEntries(Object.keys(fields).map((field) => [field, before[field as keyof Fields]])),
  after: fields,
});

/** A name that another of the same kind has already. */
export const nameTaken = (path = 'body.name'): Refusal =>
  new Refusal('bad-request', { fields: [{ path, message: 'this name is used already' }] });

/** Names in a list are told apart without regard to case and blanks at the ends. */
export const isNameTaken = (
  rows: readonly { id: string; name: string }[],
  name: string,
  exceptId: string | null = null,
): boolean => rows.some((row) => row.id !== exceptId && row.name.trim().toLowerCase() === name.trim().toLowerCase());
