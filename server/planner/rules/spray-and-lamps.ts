import { firstFrom, zoneAir } from '../lamp-uses.ts';
import type { Rule } from '../plan-view.ts';

/** Rule 12: no lamp is present in a zone while it is sprayed there, nor lit before the purge is over (29 CFR 1910.107(j)(4)). */
export const sprayAndLamps: Rule = (view, report) => {
  const { purge } = view.problem;
  for (const [zone, { glow, mist }] of zoneAir(view)) {
    mist.sort((x, y) => x.from - y.from);
    const longest = mist.reduce((most, m) => Math.max(most, m.to - m.from), 0);
    for (const g of glow)
      for (let i = firstFrom(mist, g.from - purge - longest); i < mist.length && mist[i]!.from < g.to; i++) {
        const m = mist[i]!;
        if (g.from < m.to + purge && !(g.fixed && m.fixed))
          report('spray-meets-lamp', g.stage, [zone, m.stage], [g.from, g.to, m.from, m.to]);
      }
  }
};
