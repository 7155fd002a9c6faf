import './lib/node-version.mjs';
import { sayFault } from './lib/fault.mjs';
import { writeLicences } from './lib/licences.mjs';
import { inRoot } from './lib/places.mjs';

await writeLicences(inRoot('dist/web/licences.json')).catch((error) => {
  sayFault(error);
  process.exitCode = 1;
});
