import * as z from 'zod';

/**
 * A number with a decimal point or a decimal comma. Marks for thousands are refused, and with them `1,234`, which is one
 * number here and another there: a guess would be wrong by a factor of a thousand without anybody seeing it.
 */
export const csvNumber = z.string().transform((text, context) => {
  const bare = text.replace(/[\s  ]/g, '').replace('−', '-');
  const isPlain = /^[-+]?\d+([.,]\d+)?$/.test(bare) && !/^[-+]?[1-9]\d{0,2},\d{3}$/.test(bare);
  if (isPlain) return Number(bare.replace(',', '.'));
  context.addIssue({
    code: 'custom',
    message: /\d/.test(bare)
      ? 'Write the number without marks for thousands, such as 1234 or 12.5.'
      : 'This must be a number.',
  });
  return z.NEVER;
});

const yes = new Set(['yes', 'y', 'true', '1', 'x']);
const no = new Set(['no', 'n', 'false', '0']);
export const csvYesNo = z.string().transform((text, context) => {
  const word = text.trim().toLowerCase();
  if (yes.has(word)) return true;
  if (no.has(word)) return false;
  context.addIssue({ code: 'custom', message: 'Write yes or no.' });
  return z.NEVER;
});

/** Several short words in one cell, divided by semicolons, commas or bars; each once, in the order given. */
export const csvWords = z
  .string()
  .transform((text) => [...new Set(text.split(/[;,|]/).map((word) => word.trim()))].filter((word) => word !== ''));

/** A calendar day, year first, so that the third of the fourth is nowhere the fourth of the third. */
export const csvDay = z.iso.date({ error: 'Write the day as year-month-day, such as 2027-03-31.' });
