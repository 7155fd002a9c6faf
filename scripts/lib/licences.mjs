import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { Fault } from './fault.mjs';
import { inRoot } from './places.mjs';

/** Licences (SPDX) whose terms fit a work under AGPL-3.0-or-later. */
const fitting = new Set([
  '0BSD',
  'AGPL-3.0-or-later',
  'Apache-2.0',
  'BlueOak-1.0.0',
  'BSD-2-Clause',
  'BSD-3-Clause',
  'CC0-1.0',
  'CC-BY-4.0',
  'GPL-3.0-only',
  'GPL-3.0-or-later',
  'ISC',
  'LGPL-3.0-or-later',
  'MIT',
  'MIT-0',
  'MPL-2.0',
  'OFL-1.1',
  'Python-2.0',
  'Unlicense',
  'Zlib',
]);

/** What a package's own field does not say as an SPDX expression; read in the file named. @type {Record<string, string>} */
const stated = {
  pause: 'MIT', // Readme.md
};

/** @typedef {{ name: string, version: string, licence: string, text: string }} Notice */

/**
 * Whether an SPDX expression can be met by licences that fit: one side of an OR, both of an AND.
 * @param {string} expression
 * @returns {boolean}
 */
export function fits(expression) {
  const plain = expression.replace(/[()]/g, ' ').trim();
  return plain.split(/\s+OR\s+/).some((choice) => choice.split(/\s+AND\s+/).every((one) => fitting.has(one.trim())));
}

/** @param {Record<string, unknown>} manifest */
function licenceOf(manifest) {
  const { name, license, licenses } = /** @type {{ name: string, license?: unknown, licenses?: unknown }} */ (manifest);
  const given = stated[name] ?? license ?? (Array.isArray(licenses) ? licenses : [licenses]).map(typeOf).join(' OR ');
  return typeof given === 'string' ? given : typeOf(given);
}

/** The old form of the field: `{ "type": "MIT", "url": ... }`. @param {unknown} entry */
function typeOf(entry) {
  return typeof entry === 'object' && entry !== null && 'type' in entry ? String(entry.type) : 'none stated';
}

/** @param {string} folder */
function textOf(folder) {
  const names = readdirSync(folder).sort();
  const licences = names.filter((name) => /^(licen[cs]e|copying|notice)/i.test(name));
  // Some packages keep their licence in the readme.
  const files = licences.length > 0 ? licences : names.filter((name) => /^readme/i.test(name));
  return files.map((name) => readFileSync(path.join(folder, name), 'utf8').trim()).join('\n\n');
}

/** Notices of every package that is shipped or run, in order of their names. @returns {Notice[]} */
export function collectNotices() {
  /** @type {Record<string, { dev?: boolean, optional?: boolean, link?: boolean }>} */
  const places = JSON.parse(readFileSync(inRoot('package-lock.json'), 'utf8')).packages;
  /** @type {Map<string, Notice>} */
  const notices = new Map();
  for (const [place, { dev }] of Object.entries(places)) {
    const folder = inRoot(place);
    if (place === '' || dev || !existsSync(path.join(folder, 'package.json'))) continue;
    const manifest = JSON.parse(readFileSync(path.join(folder, 'package.json'), 'utf8'));
    const { name, version } = manifest;
    notices.set(`${name}@${version}`, { name, version, licence: licenceOf(manifest), text: textOf(folder) });
  }
  return [...notices.values()].sort((a, b) => (a.name < b.name ? -1 : a.name > b.name ? 1 : 0));
}

/**
 * Writes the notices where the app's licences page finds them.
 * @param {string} file
 * @throws {Fault} naming each package whose licence does not fit
 */
export async function writeLicences(file) {
  const notices = collectNotices();
  const unfit = notices
    .filter(({ licence }) => !fits(licence))
    .map(({ name, version, licence }) => `${name}@${version} (${licence})`);
  if (unfit.length > 0) throw new Fault(`Licences that do not fit AGPL-3.0-or-later: ${unfit.join(', ')}`);
  mkdirSync(path.dirname(file), { recursive: true });
  writeFileSync(file, JSON.stringify(notices));
}
