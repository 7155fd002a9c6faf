/**
 * What a spreadsheet would take for a formula when it opens the file: a cell that begins with = + - @ or a tab or a line
 * end (OWASP, "CSV Injection"). Such text goes out behind an apostrophe; text that has apostrophes before such a sign gets
 * one more, so that taking one off always gives back what was there.
 */
const goesOutBehindOne = /^'*[=+\-@\t\r\n＝＋－＠]/;
const cameBehindOne = /^'+[=+\-@\t\r\n＝＋－＠]/;

export const escapeCell = (text: string): string => (goesOutBehindOne.test(text) ? `'${text}` : text);
export const unescapeCell = (text: string): string => (cameBehindOne.test(text) ? text.slice(1) : text);

/** A key of a row as its header: `goodUntil` is `good until`. */
export const headerOf = (key: string): string => key.replace(/[A-Z0-9]+/g, (part) => ` ${part.toLowerCase()}`).trim();

/** Headers are the same whatever their case, blanks and signs: `Good until`, `good_until` and `goodUntil`. */
export const sameHeader = (header: string): string => header.toLowerCase().replace(/[^\p{L}\p{N}]/gu, '');
