import { overlaps } from '../intervals.ts';
import { lampUses } from '../lamp-uses.ts';
import type { Rule } from '../plan-view.ts';

/** Rule 7: no place and no lamp is used while it is closed. */
export const closed: Rule = (view, report) => {
  for (const h of view.holds) {
    if (h.fixed) continue;
    for (const c of view.places.get(h.place)?.closed ?? [])
      if (overlaps(h.from, h.to, c)) report('place-closed', h.stage, [h.place], [c[0], c[1]]);
  }
  for (const use of lampUses(view)) {
    if (use.fixed) continue;
    for (const c of view.lamps.get(use.lamp)?.closed ?? [])
      if (overlaps(use.from, use.to, c)) report('lamp-closed', use.stage, [use.lamp], [c[0], c[1]]);
  }
};
