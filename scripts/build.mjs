// Builds what `npm start` runs: dist/server and dist/web. Skips a part whose sources are the same as last time.
import './lib/node-version.mjs';
import { buildServer, buildWeb } from './lib/build.mjs';
import { sayFault } from './lib/fault.mjs';

try {
  await buildServer();
  await buildWeb();
} catch (error) {
  sayFault(error);
  process.exitCode = 1;
}
