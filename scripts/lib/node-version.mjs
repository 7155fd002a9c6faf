// Imported first by every command: an old Node must get one line, not a stack from deep inside.
import { readFileSync } from 'node:fs';

const wanted = JSON.parse(readFileSync(new URL('../../package.json', import.meta.url), 'utf8')).engines.node;

/** @param {string} version @returns {[number, number]} */
function majorMinor(version) {
  const [major, minor] = version.replace(/^[^\d]+/, '').split('.');
  return [Number(major), Number(minor || 0)];
}

/**
 * Whether a version lies in a range of the form `>=20.19 <21 || >=22.12`, the only form used in package.json.
 * @param {string} version @param {string} range
 */
export function satisfies(version, range) {
  const [major, minor] = majorMinor(version);
  return range.split('||').some((part) =>
    part
      .trim()
      .split(/\s+/)
      .every((bound) => {
        const [boundMajor, boundMinor] = majorMinor(bound);
        const atLeast = major > boundMajor || (major === boundMajor && minor >= boundMinor);
        return bound.startsWith('>=') ? atLeast : !atLeast;
      }),
  );
}

if (!satisfies(process.versions.node, wanted)) {
  process.stderr.write(`Ovenbird needs Node.js ${wanted}; this is ${process.versions.node}.\n`);
  process.exit(1);
}
