import { lampUses, type LampUse } from '../lamp-uses.ts';
import type { Rule, Sound } from '../plan-view.ts';

/** Rule 10: the right number of the mode's lamps, each with one load at a time, with time to roll it over. */
export const lamps: Rule = (view, report) => {
  for (const s of view.sound) {
    if (!rightLamps(s)) report('wrong-lamps', s.at.stage, s.at.lamps, [s.mode.lampCount]);
    s.mode.phases.forEach((phase, k) => {
      if (phase.lamp && s.mode.lampCount === 0) report('no-lamp-in-mode', s.at.stage, [], [k]);
    });
  }
  const byLamp = new Map<string, LampUse[]>();
  for (const use of lampUses(view)) {
    const list = byLamp.get(use.lamp);
    if (list) list.push(use);
    else if (view.lamps.has(use.lamp)) byLamp.set(use.lamp, [use]);
    else report('unknown-lamp', use.stage, [use.lamp]);
  }
  for (const [id, list] of byLamp) {
    list.sort((x, y) => x.from - y.from);
    list.forEach((one, i) => {
      for (let k = i + 1; k < list.length; k++) {
        const two = list[k]!;
        if (two.from >= one.to + view.problem.lampMove) break;
        const move = one.place === two.place ? 0 : view.problem.lampMove;
        if (two.from < one.to + move && !(one.fixed && two.fixed))
          report('lamp-busy', two.stage, [id, one.stage], [two.from, one.to, move]);
      }
    });
  }
};

const rightLamps = ({ at, mode }: Sound): boolean =>
  new Set(at.lamps).size === mode.lampCount &&
  at.lamps.length === mode.lampCount &&
  at.lamps.every((l) => mode.lamps.includes(l));
