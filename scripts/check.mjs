// Everything a change has to pass before it goes to others: npm test, and the format.
import './lib/node-version.mjs';
import { conclude, runChecks, runTests } from './lib/checks.mjs';

const checked = await runChecks(['types', 'lint', 'format', 'build']);
conclude([checked, await runTests(process.argv.slice(2))]);
