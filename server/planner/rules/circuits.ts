import { overfilled } from '../intervals.ts';
import { lampUses } from '../lamp-uses.ts';
import type { Rule } from '../plan-view.ts';

/** Rule 11: the lamps lit at any minute draw no more than their circuit gives. */
export const circuits: Rule = (view, report) => {
  const uses = lampUses(view);
  for (const circuit of view.problem.circuits) {
    const draws = uses.flatMap((use) => {
      const lamp = view.lamps.get(use.lamp);
      if (lamp?.circuit !== circuit.id) return [];
      return use.lit.map(([from, to]) => ({ from, to, amount: lamp.kw, stage: use.stage, fixed: use.fixed }));
    });
    for (const d of overfilled(draws, circuit.kw)) report('circuit-full', d.stage, [circuit.id], [d.from]);
  }
};
