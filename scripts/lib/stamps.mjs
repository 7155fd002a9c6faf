import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { inRoot } from './places.mjs';

/** @param {string} place @returns {string[]} every file below, in a fixed order */
function filesBelow(place) {
  if (!existsSync(place)) return [];
  if (!statSync(place).isDirectory()) return [place];
  return readdirSync(place)
    .sort()
    .flatMap((name) => filesBelow(path.join(place, name)));
}

/** One hash of the names and contents of files and folders. @param {string[]} places from the project's root */
export function hashOf(places) {
  const hash = createHash('sha256');
  for (const file of places.flatMap((place) => filesBelow(inRoot(place)))) {
    hash.update(path.relative(inRoot(), file)).update('\0').update(readFileSync(file)).update('\0');
  }
  return hash.digest('hex');
}

/**
 * Runs a step unless its stamp says that it ran on just these inputs and its product is still there.
 * @param {{ stamp: string, inputs: string[], product: string, step: () => Promise<void> }} work
 */
export async function unlessStamped({ stamp, inputs, product, step }) {
  const file = inRoot(stamp);
  const wanted = hashOf(inputs);
  if (existsSync(inRoot(product)) && existsSync(file) && readFileSync(file, 'utf8') === wanted) return;
  await step();
  mkdirSync(path.dirname(file), { recursive: true });
  writeFileSync(file, wanted);
}
