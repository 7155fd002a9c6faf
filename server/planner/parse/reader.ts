import type { Interval, Minutes } from '../types.ts';

/** Collects faults, one clear line each, while values are read; a faulty value is replaced by a harmless one. */
export type Reader = { faults: string[]; fault: (path: string, what: string) => void };

export type Fields = Record<string, unknown>;

export function makeReader(): Reader {
  const faults: string[] = [];
  return { faults, fault: (path, what) => faults.push(`${path} ${what}`) };
}

const show = (value: unknown): string => {
  const text = JSON.stringify(value) ?? String(value);
  return text.length > 60 ? `${text.slice(0, 57)}...` : text;
};

export function readObject(r: Reader, value: unknown, path: string): Fields {
  if (typeof value === 'object' && value !== null && !Array.isArray(value)) return value as Fields;
  r.fault(path, `must be an object, is ${show(value)}`);
  return {};
}

/** A list; absent gives an empty one unless it is required. */
export function readList<T>(
  r: Reader,
  value: unknown,
  path: string,
  item: (value: unknown, path: string) => T,
  required = false,
): T[] {
  if (value === undefined && !required) return [];
  if (!Array.isArray(value)) {
    r.fault(path, value === undefined ? 'is missing' : `must be a list, is ${show(value)}`);
    return [];
  }
  return value.map((x: unknown, i) => item(x, `${path}[${i}]`));
}

export function readText(r: Reader, value: unknown, path: string): string {
  if (typeof value === 'string' && value !== '') return value;
  r.fault(path, value === undefined ? 'is missing' : `must be a text that is not empty, is ${show(value)}`);
  return '';
}

export const readTextOrNull = (r: Reader, value: unknown, path: string): string | null =>
  value === undefined || value === null ? null : readText(r, value, path);

export function readOneOf<T extends string>(r: Reader, value: unknown, path: string, allowed: readonly T[]): T {
  const found = allowed.find((x) => x === value);
  if (found === undefined) r.fault(path, `must be one of ${allowed.join(', ')}, is ${show(value)}`);
  return found ?? (allowed[0] as T);
}

export function readBoolean(r: Reader, value: unknown, path: string): boolean {
  if (value !== undefined && typeof value !== 'boolean') r.fault(path, `must be true or false, is ${show(value)}`);
  return value === true;
}

/** Whole minutes, zero or more, small enough to count exactly. */
export function readMinutes(r: Reader, value: unknown, path: string, absent?: Minutes): Minutes {
  if (value === undefined && absent !== undefined) return absent;
  if (typeof value !== 'number' || !Number.isFinite(value))
    r.fault(path, value === undefined ? 'is missing' : `must be whole minutes, is ${show(value)}`);
  else if (value < 0) r.fault(path, `must not be negative, is ${value}`);
  else if (!Number.isInteger(value)) r.fault(path, `must be whole minutes, is ${value}`);
  else if (value > 1e9) r.fault(path, `must be at most 1000000000, is ${value}`);
  else return value;
  return 0;
}

export const readMinutesOrNull = (r: Reader, value: unknown, path: string): Minutes | null =>
  value === undefined || value === null ? null : readMinutes(r, value, path);

/** A number, zero or more (kilowatts, units, weights). */
export function readAmount(r: Reader, value: unknown, path: string, absent?: number): number {
  if (value === undefined && absent !== undefined) return absent;
  if (typeof value === 'number' && value >= 0 && value <= 1e12) return value;
  r.fault(path, value === undefined ? 'is missing' : `must be a number, zero or more, is ${show(value)}`);
  return 0;
}

/** `[from, to]` in whole minutes. */
export function readInterval(r: Reader, value: unknown, path: string, mayBeEmpty = false): Interval {
  if (!Array.isArray(value) || value.length !== 2) {
    r.fault(path, `must be [from, to], is ${show(value)}`);
    return [0, 0];
  }
  const from = readMinutes(r, value[0], `${path}[0]`);
  const to = readMinutes(r, value[1], `${path}[1]`);
  if (to < from || (to === from && !mayBeEmpty)) r.fault(path, `must end after it starts, is [${from}, ${to}]`);
  return [from, to];
}

export const readIntervals = (r: Reader, value: unknown, path: string): Interval[] =>
  readList(r, value, path, (x, p) => readInterval(r, x, p));

/** Says which ids of a list occur twice. */
export function refuseTwice(r: Reader, ids: readonly string[], path: string): void {
  const seen = new Set<string>();
  ids.forEach((id, i) => {
    if (id !== '' && seen.has(id)) r.fault(`${path}[${i}]`, `repeats the id ${show(id)}`);
    seen.add(id);
  });
}

export function refuseUnknown(
  r: Reader,
  id: string | null,
  known: { has(id: string): boolean },
  path: string,
  noun: string,
): void {
  if (id !== null && id !== '' && !known.has(id)) r.fault(path, `names an unknown ${noun} ${show(id)}`);
}
