import { overfilled } from '../intervals.ts';
import type { Hold, Report, Rule } from '../plan-view.ts';

/** Rule 4: booths and prep stations take one load at a time, racks as many units as fit. */
export const oneLoad: Rule = (view, report) => {
  for (const { at, mode, place } of view.sound)
    if (mode.units > place.units) report('does-not-fit', at.stage, [place.id], [mode.units, place.units]);
  for (const place of view.places.values()) {
    const here = view.holdsAt.get(place.id)!;
    if (place.kind === 'rack') {
      const uses = here.map((h) => ({ ...h, amount: h.units }));
      for (const h of overfilled(uses, place.units)) report('rack-full', h.stage, [place.id], [h.from]);
    } else meetings(place.id, here, report);
  }
};

function meetings(place: string, here: readonly Hold[], report: Report): void {
  here.forEach((h, i) => {
    for (let k = i + 1; k < here.length; k++) {
      const next = here[k]!;
      if (next.from >= h.to) break;
      if (next.to > next.from && !(h.fixed && next.fixed))
        report('place-taken', next.stage, [place, h.stage], [next.from, h.to]);
    }
  });
}
