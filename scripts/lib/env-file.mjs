import { existsSync, readFileSync } from 'node:fs';
import { Fault } from './fault.mjs';

/**
 * Reads lines of the form NAME=value. Blank lines and lines that begin with # are skipped; a value may stand in single
 * or double quotes, and unquoted ends before " #".
 * @param {string} text
 * @returns {Record<string, string>}
 * @throws {Fault} naming the first line that has another form
 */
export function parseEnv(text) {
  /** @type {Record<string, string>} */
  const found = {};
  for (const [index, line] of text.split(/\r?\n/).entries()) {
    if (/^\s*(#|$)/.test(line)) continue;
    const parts = /^\s*(?:export\s+)?([A-Za-z_]\w*)\s*=\s*(?:"([^"]*)"|'([^']*)'|(.*?))\s*(?:\s#.*)?$/.exec(line);
    if (!parts?.[1]) throw new Fault(`.env, line ${index + 1}: expected NAME=value.`);
    found[parts[1]] = parts[2] ?? parts[3] ?? parts[4] ?? '';
  }
  return found;
}

/** Takes over what a file sets and the environment does not. @param {string} file */
export function loadEnv(file) {
  if (!existsSync(file)) return;
  for (const [name, value] of Object.entries(parseEnv(readFileSync(file, 'utf8')))) process.env[name] ??= value;
}
