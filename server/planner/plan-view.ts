import type {
  Assignment,
  Job,
  Lamp,
  Minutes,
  Mode,
  Person,
  Place,
  Plan,
  Problem,
  Stage,
  ViolationCode,
} from './types.ts';

/** Where a stage stands in the problem. */
export type StageRef = { job: Job; stage: Stage; index: number };

/** Stages that run together; alone where they share nothing. */
export type LoadRun = { key: string; members: Assignment[]; fixed: boolean };

/** A new assignment whose shape fits its mode, so that the other rules can be asked about it. */
export type Sound = {
  at: Assignment;
  ref: StageRef;
  mode: Mode;
  place: Place;
  previous: Assignment | null;
  run: LoadRun;
};

/** The minutes for which a load takes its place (rule 3). */
export type Hold = {
  place: string;
  from: Minutes;
  to: Minutes;
  stage: string;
  units: number;
  family: string | null;
  fixed: boolean;
  /** The load's next stages stay where they are, so no clean-up follows this one. */
  goesOn: boolean;
};

/** A plan beside its problem, with everything the rules look up. */
export type PlanView = {
  problem: Problem;
  plan: Plan;
  places: Map<string, Place>;
  lamps: Map<string, Lamp>;
  people: Map<string, Person>;
  refs: Map<string, StageRef>;
  fixed: Map<string, Assignment>;
  given: Map<string, Assignment>;
  /** Mode of each assignment that has one. */
  modes: Map<Assignment, Mode>;
  runs: LoadRun[];
  runOf: Map<string, LoadRun>;
  sound: Sound[];
  holds: Hold[];
  /** The holds of each place by their starts; of equal ones the shorter first. */
  holdsAt: Map<string, Hold[]>;
};

export type Report = (code: ViolationCode, stage: string, ids?: string[], minutes?: Minutes[]) => void;
export type Rule = (view: PlanView, report: Report) => void;

const byId = <T extends { id: string }>(list: readonly T[]): Map<string, T> => new Map(list.map((x) => [x.id, x]));

export const modeOf = (view: PlanView, at: Assignment): Mode | undefined => view.modes.get(at);

const findMode = (view: PlanView, at: Assignment): Mode | undefined =>
  view.refs.get(at.stage)?.stage.modes.find((m) => m.id === at.mode);

const neighbour = (view: PlanView, at: Assignment, step: number): Assignment | null => {
  const ref = view.refs.get(at.stage);
  const next = ref?.job.stages[ref.index + step];
  return next ? (view.given.get(next.id) ?? null) : null;
};
export const nextOf = (view: PlanView, at: Assignment): Assignment | null => neighbour(view, at, 1);

/** Lays a plan beside its problem. Assignments of unknown stages and repeated ones are left to rule 1. */
export function viewPlan(problem: Problem, plan: Plan): PlanView {
  const view: PlanView = {
    problem,
    plan,
    places: byId(problem.places),
    lamps: byId(problem.lamps),
    people: byId(problem.people),
    refs: new Map(),
    fixed: new Map(problem.fixed.map((a) => [a.stage, a])),
    given: new Map(),
    modes: new Map(),
    runs: [],
    runOf: new Map(),
    sound: [],
    holds: [],
    holdsAt: new Map(),
  };
  for (const job of problem.jobs) job.stages.forEach((stage, index) => view.refs.set(stage.id, { job, stage, index }));
  for (const a of plan.assignments) if (view.refs.has(a.stage) && !view.given.has(a.stage)) view.given.set(a.stage, a);
  for (const a of view.given.values()) {
    const mode = findMode(view, a);
    if (mode) view.modes.set(a, mode);
  }
  gatherRuns(view);
  gatherSound(view);
  view.holds = view.runs.map((run) => holdOf(view, run));
  for (const place of problem.places) view.holdsAt.set(place.id, []);
  for (const h of view.holds) view.holdsAt.get(h.place)?.push(h);
  for (const here of view.holdsAt.values()) here.sort((x, y) => x.from - y.from || x.to - y.to);
  return view;
}

function gatherRuns(view: PlanView): void {
  const byKey = new Map<string, LoadRun>();
  for (const a of view.given.values()) {
    const key = a.load === null ? `stage ${a.stage}` : `load ${a.load}`;
    const run = byKey.get(key) ?? { key, members: [], fixed: true };
    run.members.push(a);
    run.fixed &&= view.fixed.has(a.stage);
    byKey.set(key, run);
    view.runOf.set(a.stage, run);
  }
  view.runs = [...byKey.values()];
}

function gatherSound(view: PlanView): void {
  for (const at of view.given.values()) {
    const ref = view.refs.get(at.stage);
    const run = view.runOf.get(at.stage);
    const mode = modeOf(view, at);
    const place = view.places.get(at.place);
    if (!ref || !run || !mode || !place || view.fixed.has(at.stage) || at.phases.length !== mode.phases.length)
      continue;
    view.sound.push({ at, ref, mode, place, previous: neighbour(view, at, -1), run });
  }
}

/** Rule 3: from the start to the end, then for the next stage's settling, or until it ends where it stays. */
function holdOf(view: PlanView, run: LoadRun): Hold {
  const first = run.members[0] as Assignment;
  let to = Math.max(...run.members.map((m) => m.end));
  let units = 0;
  let goesOn = false;
  for (const m of run.members) {
    units += modeOf(view, m)?.units ?? 1;
    const next = nextOf(view, m);
    const mode = next && modeOf(view, next);
    if (!mode) continue;
    if (mode.stay) {
      to = Math.max(to, next.start);
      goesOn = true;
    } else to = Math.max(to, m.end + mode.gap.settle);
  }
  const family = modeOf(view, first)?.family ?? null;
  return { place: first.place, from: first.start, to, stage: first.stage, units, family, fixed: run.fixed, goesOn };
}
