import { accessSync, constants } from 'node:fs';
import path from 'node:path';
import { Fault } from './fault.mjs';
import { installPackages } from './postgres-programs.mjs';

const names = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable'];
const applications = [
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  '/Applications/Chromium.app/Contents/MacOS/Chromium',
];

/** Path of the browser for tests: CHROMIUM_PATH, or the system's. @returns {string | undefined} */
export function findChromium() {
  const given = process.env['CHROMIUM_PATH'];
  const folders = (process.env['PATH'] ?? '').split(path.delimiter).filter(Boolean);
  const candidates = given
    ? [given]
    : [...folders.flatMap((folder) => names.map((name) => path.join(folder, name))), ...applications];
  return candidates.find((file) => {
    try {
      accessSync(file, constants.X_OK);
      return true;
    } catch {
      return false;
    }
  });
}

/** @returns {string} @throws {Fault} when there is none and none can be installed */
export function ensureChromium() {
  const found = findChromium() ?? (installPackages(['chromium', 'fonts-liberation']) ? findChromium() : undefined);
  if (found) return found;
  throw new Fault(
    'No Chromium found for the browser tests. Install one (Debian, Ubuntu: sudo apt-get install chromium), or set CHROMIUM_PATH.',
  );
}
