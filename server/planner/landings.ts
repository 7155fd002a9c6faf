import { NEVER } from './engine/calendar.ts';
import { setAsk } from './engine/chain.ts';
import { compileShop } from './engine/compile.ts';
import { fitFrom } from './engine/fit.ts';
import { makePlacer, type Placer } from './engine/placer.ts';
import type { Way } from './engine/shop.ts';
import { slackOf } from './engine/slack.ts';
import type { Interval, Minutes, Plan, Problem } from './types.ts';

/** Starts at which the stage may begin in one place, done in this mode by this person: `[from, to)`. */
export type Window = { from: Minutes; to: Minutes; mode: string; person: string | null };

export type LandingReason =
  | 'fixed' // it is fixed: nothing of it may move
  | 'in-a-load' // it runs with others, and they cannot stay behind
  | 'job-unplaced' // the stages around it have no place either
  | 'place-not-allowed' // no mode of the stage knows the place
  | 'does-not-fit' // too small
  | 'must-stay' // it, or what follows, stays where the part already stands
  | 'no-room'; // allowed, but never free together with what it needs

/** Where a stage may land in one place, everything else standing as it does; the reason where it never may. */
export type Landing = { place: string; starts: Interval[]; windows: Window[]; why: LandingReason | null };

/**
 * Every start at which the stage could stand in every place, all other assignments of the plan unchanged: those at which
 * `checkPlan` finds nothing broken, for some mode, person and lamps, its phases following as early as they can.
 * Throws a RangeError for a stage that the problem does not have.
 */
export function landings(problem: Problem, plan: Plan, stageId: string): Landing[] {
  const job = problem.jobs.find((j) => j.stages.some((s) => s.id === stageId));
  if (!job) throw new RangeError(`no stage ${stageId}`);
  const nowhere = (why: LandingReason): Landing[] =>
    problem.places.map((p) => ({ place: p.id, starts: [], windows: [], why }));
  if (problem.fixed.some((f) => f.stage === stageId)) return nowhere('fixed');
  const own = plan.assignments.find((a) => a.stage === stageId);
  const others = plan.assignments.filter((a) => a.stage !== stageId);
  if (own && own.load !== null && others.some((a) => a.load === own.load)) return nowhere('in-a-load');
  const stands = new Set(others.map((a) => a.stage));
  if (!job.stages.every((s) => s.id === stageId || stands.has(s.id))) return nowhere('job-unplaced');
  const p = makePlacer(compileShop({ ...problem, fixed: others, baseline: [] }));
  const s = p.shop.stageIds.indexOf(stageId);
  return problem.places.map((place, index) => landing(p, s, index, place.id));
}

function landing(p: Placer, s: number, place: number, id: string): Landing {
  const windows: Window[] = [];
  let why: LandingReason = 'place-not-allowed';
  p.shop.ways[s]!.forEach((way, mode) => {
    const refused = refuses(p, s, way, place);
    if (refused) {
      if (why === 'place-not-allowed') why = refused;
      return;
    }
    why = 'no-room';
    const people = way.hands ? [...way.people] : [-1];
    for (const person of people) modeWindows(p, s, way, mode, place, person, windows);
  });
  windows.sort((x, y) => x.from - y.from || x.to - y.to);
  return { place: id, starts: union(windows), windows, why: windows.length ? null : why };
}

/** Why a way may never be done in a place whatever the time, or null. */
function refuses(p: Placer, s: number, way: Way, place: number): LandingReason | null {
  const { shop, state } = p;
  const job = shop.jobs[shop.stageJob[s]!]!;
  const next = s < job.last ? state.at.way[s + 1]! : null;
  if (way.stay && (s === job.first || state.at.place[s - 1] !== place)) return 'must-stay';
  if (!way.stay && !way.places.includes(place))
    return allowedButSmall(p, s, way, place) ? 'does-not-fit' : 'place-not-allowed';
  if (way.units > shop.placeUnits[place]!) return 'does-not-fit';
  return next?.stay && state.at.place[s + 1] !== place ? 'must-stay' : null;
}

/** Places too small for a way are left out of its list; the mode still names them. */
function allowedButSmall(p: Placer, s: number, way: Way, place: number): boolean {
  const { problem, jobs, stageJob } = p.shop;
  const job = stageJob[s]!;
  const mode = problem.jobs[job]!.stages[s - jobs[job]!.first]!.modes[p.shop.ways[s]!.indexOf(way)]!;
  return mode.places.includes(problem.places[place]!.id) && way.units > p.shop.placeUnits[place]!;
}

type Limits = { from: number; to: number; endFrom: number; endTo: number };

/** What release, now and the stages before and after leave for start and end. */
function limitsOf(p: Placer, s: number, way: Way): Limits {
  const { shop, state } = p;
  const { at } = state;
  const job = shop.jobs[shop.stageJob[s]!]!;
  const first = s === job.first;
  const next = s < job.last ? at.way[s + 1]! : null;
  return {
    from: Math.max(shop.now, first ? job.release : at.end[s - 1]! + way.gapMin),
    to: first || way.gapMax >= NEVER ? NEVER : at.end[s - 1]! + way.gapMax,
    endFrom: next && next.gapMax < NEVER ? at.start[s + 1]! - next.gapMax : 0,
    endTo: Math.min(shop.horizon, next ? at.start[s + 1]! - next.gapMin : NEVER),
  };
}

function modeWindows(
  p: Placer,
  s: number,
  way: Way,
  mode: number,
  place: number,
  person: number,
  into: Window[],
): void {
  const { shop, fit, ask } = p;
  const limits = limitsOf(p, s, way);
  p.wayOf[s] = way;
  if (!setAsk(p, s)) return;
  ask.place = place;
  ask.person = person;
  fit.careful = true;
  const job = shop.problem.jobs[shop.stageJob[s]!]!;
  const modeId = job.stages[s - shop.jobs[shop.stageJob[s]!]!.first]!.modes[mode]!.id;
  const who = person < 0 ? null : shop.problem.people[person]!.id;
  let open: Window | null = null;
  for (let at = limits.from; at <= limits.to && fitFrom(p.state, ask, at, limits.endTo + 1, fit);) {
    if (fit.start > limits.to) return;
    if (fit.end < limits.endFrom) {
      at = fit.start + (way.rigid ? limits.endFrom - fit.end : 1);
      continue;
    }
    const last = Math.min(fit.start + Math.min(slackOf(p.state, ask, fit), limits.endTo - fit.end), limits.to);
    if (open && open.to === fit.start) open.to = last + 1;
    else into.push((open = { from: fit.start, to: last + 1, mode: modeId, person: who }));
    at = last + 1;
  }
}

function union(windows: readonly Window[]): Interval[] {
  const out: [Minutes, Minutes][] = [];
  for (const { from, to } of windows) {
    const last = out[out.length - 1];
    if (last && from <= last[1]) last[1] = Math.max(last[1], to);
    else out.push([from, to]);
  }
  return out;
}
