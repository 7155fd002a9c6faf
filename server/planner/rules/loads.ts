import type { PlanView, Report, Rule, Sound } from '../plan-view.ts';
import { modeOf, nextOf } from '../plan-view.ts';
import type { Assignment, Mode } from '../types.ts';

const sameLamps = (a: Assignment, b: Assignment): boolean =>
  String([...a.lamps].sort()) === String([...b.lamps].sort());
const kinds = (mode: Mode | undefined): string => String(mode?.phases.map((p) => p.kind));

/** Rule 5: what runs as one load shares place, person, lamps and times, fits together, and stays together. */
export const loads: Rule = (view, report) => {
  for (const s of view.sound) if (s.run.members.length > 1) member(view, s, report);
};

function member(view: PlanView, { at, mode, place, run }: Sound, report: Report): void {
  const first = run.members[0] as Assignment;
  const firstMode = modeOf(view, first);
  if (mode.load === null || firstMode?.load !== mode.load) report('load-not-shared', at.stage);
  const same =
    (['place', 'person', 'start', 'end'] as const).every((key) => first[key] === at[key]) &&
    String(first.phases) === String(at.phases) &&
    sameLamps(first, at);
  if (!same) report('load-differs', at.stage, [first.stage]);
  if (firstMode && kinds(firstMode) !== kinds(mode)) report('load-kinds-differ', at.stage, [first.stage]);
  const units = run.members.reduce((sum, m) => sum + (modeOf(view, m)?.units ?? 1), 0);
  if (units > place.units) report('load-too-big', at.stage, [place.id], [units, place.units]);
  const onward = run.members.map((m) => {
    const next = nextOf(view, m);
    return next && modeOf(view, next)?.stay ? view.runOf.get(next.stage)?.key : null;
  });
  if (new Set(onward).size > 1) report('load-parts', at.stage);
  if (run.members.some((m) => view.fixed.has(m.stage))) report('load-is-fixed', at.stage);
}
