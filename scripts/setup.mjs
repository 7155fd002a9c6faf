// Brings a fresh checkout to where it can start, or with --for-tests to where the tests can run. Does nothing the second time.
import './lib/node-version.mjs';
import { buildServer, buildWeb } from './lib/build.mjs';
import { ensureChromium } from './lib/chromium.mjs';
import { sayFault } from './lib/fault.mjs';
import { installPackagesOfLock } from './lib/install.mjs';
import { findPrograms } from './lib/postgres-programs.mjs';

try {
  await installPackagesOfLock();
  if (process.argv.includes('--for-tests')) {
    findPrograms(undefined);
    ensureChromium();
  } else {
    await buildServer();
    await buildWeb();
  }
} catch (error) {
  sayFault(error);
  process.exitCode = 1;
}
