import { liesWithin } from '../intervals.ts';
import type { Rule } from '../plan-view.ts';

/** Rule 9: what needs somebody on the premises lies within `open`. */
export const premises: Rule = (view, report) => {
  for (const { at, mode } of view.sound)
    mode.phases.forEach((phase, k) => {
      const [from, to] = at.phases[k] ?? [0, 0];
      if (phase.attendance === 'onsite' && !liesWithin(from, to, view.problem.open))
        report('nobody-there', at.stage, [], [k, from, to]);
    });
};
