import type { Hold, Rule } from '../plan-view.ts';

/** Rule 6: between two loads in a booth at least the minutes that their families ask for. */
export const cleanUp: Rule = (view, report) => {
  const needs = new Map(view.problem.cleanups.map((c) => [`${c.from}>${c.to}`, c.minutes]));
  const longest = Math.max(0, ...needs.values());
  const need = (a: Hold, b: Hold): number => needs.get(`${a.family}>${b.family}`) ?? 0;
  for (const place of view.places.values()) {
    if (place.kind !== 'booth') continue;
    const here = view.holdsAt.get(place.id)!;
    here.forEach((a, i) => {
      if (a.goesOn) return;
      for (let k = i + 1; k < here.length; k++) {
        const b = here[k]!;
        if (b.from >= a.to + longest) break;
        if (b.from >= a.to && b.from < a.to + need(a, b) && !(a.fixed && b.fixed))
          report('clean-up', b.stage, [place.id, a.stage], [b.from - a.to, need(a, b)]);
      }
    });
  }
};
