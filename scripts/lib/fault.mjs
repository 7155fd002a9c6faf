/** A fault that the person at the terminal can mend: shown as one line, without a stack. */
export class Fault extends Error {}

/**
 * Ends the process with one clear line for a Fault, or with everything known for what nobody foresaw.
 * @param {unknown} error
 */
export function sayFault(error) {
  const text =
    error instanceof Fault ? error.message : error instanceof Error ? (error.stack ?? error.message) : String(error);
  process.stderr.write(`${text}\n`);
}
