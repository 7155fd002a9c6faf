import type { PlanView, Report, Rule, Sound } from '../plan-view.ts';
import { modeOf } from '../plan-view.ts';
import type { Assignment, Mode, PhaseKind } from '../types.ts';

const ADD_UP: ReadonlySet<PhaseKind> = new Set(['setup', 'work', 'spray']);

/** Minutes that a phase takes in its load: hands-on kinds add up, the others take the longest (rule 5). */
export function minutesInLoad(view: PlanView, sound: Sound, k: number): number {
  if (sound.run.members.length === 1) return sound.mode.phases[k]?.minutes ?? 0;
  const all = sound.run.members.map((m) => modeOf(view, m)?.phases[k]?.minutes ?? 0);
  const kind = sound.mode.phases[k]?.kind;
  return kind && ADD_UP.has(kind) ? all.reduce((x, y) => x + y, 0) : Math.max(...all);
}

/** Rule 1: each stage takes one of its modes, in order, within release, now and horizon; a job is whole or unplaced. */
export const order: Rule = (view, report) => {
  const seen = new Set<string>();
  for (const a of view.plan.assignments) {
    if (!view.refs.has(a.stage)) report('unknown-stage', a.stage);
    else if (seen.has(a.stage)) report('assigned-twice', a.stage);
    seen.add(a.stage);
  }
  wholeJobs(view, report);
  for (const a of view.given.values()) if (!view.fixed.has(a.stage)) shape(view, a, report);
  for (const s of view.sound) {
    if (!s.mode.stay && !s.mode.places.includes(s.at.place)) report('place-not-allowed', s.at.stage, [s.at.place]);
    if (s.ref.index > 0 && !s.previous) report('previous-missing', s.at.stage);
    phases(view, s, report);
  }
};

function wholeJobs(view: PlanView, report: Report): void {
  const unplaced = new Map(view.plan.unplaced.map((u) => [u.job, u]));
  for (const job of view.problem.jobs) {
    const loose = job.stages.filter((s) => !view.fixed.has(s.id));
    const placed = loose.filter((s) => view.given.has(s.id)).length;
    const entry = unplaced.get(job.id);
    if (entry) {
      if (placed) report('half-unplaced', job.id);
      if (!entry.reason) report('unplaced-without-reason', job.id);
    } else if (placed !== loose.length) report('stage-missing', job.id);
  }
}

function shape(view: PlanView, a: Assignment, report: Report): void {
  const mode = modeOf(view, a);
  if (!mode) return report('unknown-mode', a.stage, [a.mode]);
  if (a.phases.length !== mode.phases.length)
    return report('phase-count', a.stage, [], [a.phases.length, mode.phases.length]);
  times(view, a, mode, report);
  if (!view.places.has(a.place)) report('unknown-place', a.stage, [a.place]);
}

function times(view: PlanView, a: Assignment, mode: Mode, report: Report): void {
  const { now, horizon } = view.problem;
  const ref = view.refs.get(a.stage);
  const first = a.phases[0];
  const last = a.phases[mode.phases.length - 1];
  const whole = Number.isInteger(a.start) && Number.isInteger(a.end);
  if (!whole || !a.phases.every(([from, to]) => Number.isInteger(from) && Number.isInteger(to)))
    report('not-whole-minutes', a.stage);
  if (first && last && (first[0] !== a.start || last[1] !== a.end)) report('ends-not-of-phases', a.stage);
  if (a.start < now) report('before-now', a.stage, [], [a.start, now]);
  if (a.end > horizon) report('after-horizon', a.stage, [], [a.end, horizon]);
  if (ref?.index === 0 && a.start < ref.job.release) report('before-release', a.stage, [], [a.start, ref.job.release]);
}

function phases(view: PlanView, s: Sound, report: Report): void {
  s.mode.phases.forEach((phase, k) => {
    const [from, to] = s.at.phases[k] ?? [0, 0];
    const before = s.at.phases[k - 1];
    if (before) {
      const idle = from - before[1];
      const most = s.mode.phases[k - 1]?.wait ?? 0;
      if (idle < 0 || idle > most) report('phase-wait', s.at.stage, [], [k, idle, most]);
    }
    const paused = phase.attendance === 'hands' && s.mode.split; // its length is the shift's business: rule 8
    const need = minutesInLoad(view, s, k);
    if (!paused && to - from !== need) report('phase-length', s.at.stage, [], [k, to - from, need]);
  });
}
