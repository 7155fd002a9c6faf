// Checks the types of every part (tsconfig.*.json) in one run of the compiler, which reads shared files once.
import './lib/node-version.mjs';
import { checks } from './lib/checks.mjs';

process.exitCode = await checks.types();
