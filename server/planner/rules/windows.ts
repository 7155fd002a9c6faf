import type { Rule } from '../plan-view.ts';

/** Rule 2: at least `gap.min` and at most `gap.max` minutes after the job's previous stage. */
export const windows: Rule = (view, report) => {
  for (const { at, mode, previous } of view.sound) {
    if (!previous) continue;
    const gap = at.start - previous.end;
    const { min, max } = mode.gap;
    if (gap < min) report('too-soon', at.stage, [previous.stage], [gap, min]);
    if (max !== null && gap > max) report('too-late', at.stage, [previous.stage], [gap, max]);
  }
};
