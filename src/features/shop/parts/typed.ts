import * as z from 'zod';

/** A number as typed, with a point or a comma; null where it is none. */
export function readTyped(text: string): number | null {
  const plain = text.trim().replace(',', '.');
  return /^-?\d+(\.\d+)?$/.test(plain) ? Number(plain) : null;
}

export const typedOf = (number: number | null): string => (number === null ? '' : String(number));

type Range = { min: number; max: number; whole?: boolean };
const faultOf = ({ min, max, whole }: Range): string => `Enter a ${whole ? 'whole ' : ''}number from ${min} to ${max}.`;

/** A field that needs a number, as the form holds it (text) and as the contract wants it. */
export const typedNumber = (range: Range) =>
  z.string().transform((text, context) => {
    const number = readTyped(text);
    const fits = number !== null && number >= range.min && number <= range.max;
    if (fits && (!range.whole || Number.isInteger(number))) return number;
    context.addIssue({ code: 'custom', message: faultOf(range) });
    return z.NEVER;
  });

/** The same where nothing may be typed: null then. */
export const typedMaybe = (range: Range) =>
  z.string().transform((text, context) => {
    if (text.trim() === '') return null;
    const read = typedNumber(range).safeParse(text);
    if (read.success) return read.data;
    context.addIssue({ code: 'custom', message: faultOf(range) });
    return z.NEVER;
  });

export const typedName = z.string().trim().min(1, 'Enter a name.').max(80, 'At most 80 characters.');
