import { writeFileSync } from 'node:fs';
import type { Reporter, TestModule } from 'vitest/node';

/** How many tests passed, failed and were skipped; a file that cannot be loaded counts as one failed. */
export type Counts = { passed: number; failed: number; skipped: number };

function countsOf(modules: readonly TestModule[], stray: number): Counts {
  const counts: Counts = { passed: 0, failed: stray, skipped: 0 };
  for (const module of modules) {
    const states = [...module.children.allTests()].map((test) => test.result().state);
    for (const state of states) {
      // A test that never came to an end, as when its worker died, has not passed.
      if (state === 'pending') counts.failed += 1;
      else counts[state] += 1;
    }
    if (!module.ok() && !states.includes('failed')) counts.failed += 1;
  }
  return counts;
}

/** Hands the numbers of a run to scripts/test.mjs, through the file it names in OVENBIRD_TEST_COUNTS. */
export default class PlainReporter implements Reporter {
  onTestRunEnd(modules: readonly TestModule[], unhandledErrors: readonly unknown[]): void {
    const file = process.env['OVENBIRD_TEST_COUNTS'];
    if (file) writeFileSync(file, JSON.stringify(countsOf(modules, unhandledErrors.length)));
  }
}
