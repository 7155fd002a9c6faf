import { zoneAir } from '../lamp-uses.ts';
import type { Rule } from '../plan-view.ts';

/** Rule 12: no lamp is present in a zone while it is sprayed there, nor lit before the purge is over (29 CFR 1910.107(j)(4)). */
export const sprayAndLamps: Rule = (view, report) => {
  const { purge } = view.problem;
  for (const [zone, { glow, mist }] of zoneAir(view))
    for (const g of glow)
      for (const m of mist)
        if (m.from < g.to && g.from < m.to + purge && !(g.fixed && m.fixed))
          report('spray-meets-lamp', g.stage, [zone, m.stage], [g.from, g.to, m.from, m.to]);
};
