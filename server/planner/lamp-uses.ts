import type { PlanView } from './plan-view.ts';
import { modeOf } from './plan-view.ts';
import type { Assignment, Interval, Minutes, Mode } from './types.ts';

export type Span = { from: Minutes; to: Minutes; stage: string; fixed: boolean };
export type LampUse = Span & { lamp: string; place: string; lit: Interval[] };

const phasesWhere = (a: Assignment, mode: Mode, wanted: (p: Mode['phases'][number]) => boolean): Interval[] =>
  a.phases.filter((_, k) => mode.phases[k] && wanted(mode.phases[k]));

const spanOf = (list: readonly Interval[]): [Minutes, Minutes] | null =>
  list.length ? [(list[0] as Interval)[0], (list[list.length - 1] as Interval)[1]] : null;

const usesOf = new WeakMap<PlanView, LampUse[]>();

/** Each lamp's use by a load, from its first to its last lit minute (rule 10). Made once for each view. */
export function lampUses(view: PlanView): readonly LampUse[] {
  const known = usesOf.get(view);
  if (known) return known;
  const made = findLampUses(view);
  usesOf.set(view, made);
  return made;
}

function findLampUses(view: PlanView): LampUse[] {
  return view.runs.flatMap(({ members, fixed }) => {
    const a = members[0] as Assignment;
    const mode = modeOf(view, a);
    const lit = mode ? phasesWhere(a, mode, (p) => p.lamp === true) : [];
    const span = spanOf(lit);
    if (!span) return [];
    return a.lamps.map((lamp) => ({ lamp, place: a.place, lit, from: span[0], to: span[1], stage: a.stage, fixed }));
  });
}

/** Per zone: when lamps are present (`glow`) and when something is sprayed, first coat to last (`mist`). */
export function zoneAir(view: PlanView): Map<string, { glow: Span[]; mist: Span[] }> {
  const air = new Map<string, { glow: Span[]; mist: Span[] }>();
  for (const { members, fixed } of view.runs) {
    const a = members[0] as Assignment;
    const mode = modeOf(view, a);
    const zone = view.places.get(a.place)?.zone ?? null;
    if (!mode || zone === null) continue;
    const here = air.get(zone) ?? { glow: [], mist: [] };
    air.set(zone, here);
    const coats = spanOf(phasesWhere(a, mode, (p) => p.kind === 'spray'));
    const lit = a.lamps.length ? spanOf(phasesWhere(a, mode, (p) => p.lamp === true)) : null;
    if (coats) here.mist.push({ from: coats[0], to: coats[1], stage: a.stage, fixed });
    if (lit) here.glow.push({ from: lit[0], to: lit[1], stage: a.stage, fixed });
  }
  return air;
}

/** Index of the first of the spans, sorted by their starts, that starts at or after `at`. */
export function firstFrom(spans: readonly Span[], at: Minutes): number {
  let lo = 0;
  let hi = spans.length;
  while (lo < hi) {
    const mid = (lo + hi) >> 1;
    if (spans[mid]!.from < at) lo = mid + 1;
    else hi = mid;
  }
  return lo;
}
