// Types, lint and every test, against throwaway databases. Arguments go to vitest: npm test -- tests/planner
import './lib/node-version.mjs';
import { conclude, runChecks, runTests } from './lib/checks.mjs';

// The browser's and the start's tests run what was built.
const checked = await runChecks(['types', 'lint', 'build']);
conclude([checked, await runTests(process.argv.slice(2))]);
