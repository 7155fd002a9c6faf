import type { Rule } from '../plan-view.ts';
import type { Assignment } from '../types.ts';

const print = (a: Assignment): string =>
  JSON.stringify([a.mode, a.place, a.person, a.start, a.end, a.phases, [...a.lamps].sort()]);

/** Rule 13: fixed assignments appear unchanged. */
export const fixedStands: Rule = (view, report) => {
  for (const [stage, fixed] of view.fixed) {
    const given = view.given.get(stage);
    if (!given) report('fixed-missing', stage);
    else if (print(given) !== print(fixed)) report('fixed-changed', stage);
  }
};
