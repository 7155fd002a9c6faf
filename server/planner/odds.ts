import { compileShop } from './engine/compile.ts';
import { type Decoder, makeDecoder } from './engine/decode.ts';
import { takeOut } from './engine/placer.ts';
import { ALONE } from './engine/shop.ts';
import { type Member, plannedSteps, runStep, type Step } from './planned-steps.ts';
import { makeRandom, type Random } from './random.ts';
import type { Assignment, Minutes, Mode, Phase, Plan, Problem } from './types.ts';

/** How long hands-on work of a kind of stage takes, as factors of what is planned: at least, most often, at most. */
export type Spread = { low: number; likely: number; high: number };

/** Per job: how often it is ready in time, how often a window is missed and it has to be planned anew, and its ends. */
export type JobOdds = {
  job: string;
  /** Share of samples with an end by the due date; 1 where there is none. A missed window counts as late. */
  onTime: number;
  windowMissed: number;
  /** Ends that a tenth, half and nine tenths of the samples do not pass; null where every sample missed a window. */
  ends: { p10: Minutes; p50: Minutes; p90: Minutes } | null;
};

/**
 * Runs the plan many times with hands-on minutes drawn from triangular distributions, by kind of stage. Who does what
 * where and in which order stays; what is late pushes what follows to the right, under all rules, and nothing starts
 * before its planned minute. What is fixed, and the minutes that the chemistry sets, stay as they are.
 */
export function odds(
  problem: Problem,
  plan: Plan,
  samples: number,
  seed: number,
  spreads: Readonly<Record<string, Spread>>,
): JobOdds[] {
  const shop = compileShop(problem);
  const d = makeDecoder(shop);
  const random = makeRandom(seed);
  const steps = plannedSteps(shop, plan);
  const ends = shop.jobs.map((): number[] => []);
  for (let n = 0; n < samples; n++) {
    runOnce(d, steps, spreads, random);
    shop.jobs.forEach((job, j) => {
      if (!d.out[j] && d.state.at.way[job.last]) ends[j]!.push(d.state.at.end[job.last]!);
    });
    for (let s = shop.stageCount - 1; s >= 0; s--) if (shop.fixedAt[s]! < 0) takeOut(d, s);
    d.out.fill(0);
  }
  const placed = new Set(plan.assignments.map((a) => a.stage));
  return shop.jobs.flatMap((job, j) => {
    const source = problem.jobs[j]!;
    return placed.has(shop.stageIds[job.last]!) ? [oddsOf(source.id, source.due, ends[j]!, samples)] : [];
  });
}

function oddsOf(job: string, due: Minutes | null, ends: number[], samples: number): JobOdds {
  ends.sort((x, y) => x - y);
  const at = (share: number): Minutes => ends[Math.min(ends.length - 1, Math.floor(share * ends.length))]!;
  const inTime = due === null ? ends.length : ends.filter((end) => end <= due).length;
  return {
    job,
    onTime: inTime / samples,
    windowMissed: (samples - ends.length) / samples,
    ends: ends.length ? { p10: at(0.1), p50: at(0.5), p90: at(0.9) } : null,
  };
}

const triangular = ({ low, likely, high }: Spread, u: number): number => {
  if (high <= low) return low;
  const turn = (likely - low) / (high - low);
  return u < turn
    ? low + Math.sqrt(u * (high - low) * (likely - low))
    : high - Math.sqrt((1 - u) * (high - low) * (high - likely));
};

const byHand = (p: Phase): boolean => p.kind === 'setup' || p.kind === 'work' || p.kind === 'spray';

/** One sample: every block as planned, with the minutes drawn, no earlier than planned. */
function runOnce(d: Decoder, steps: readonly Step[], spreads: Readonly<Record<string, Spread>>, random: Random): void {
  for (const step of steps) {
    const modes = step.members.map((member) => drawMember(d, member, spreads, random));
    const late = step.members.find(({ block }) => d.out[block.job]);
    const stuck = late ? late.block.first : runStep(d, step, modes);
    // A load runs as a whole or is planned anew as a whole.
    if (stuck >= 0) for (const { block } of step.members) if (!d.out[block.job]) giveUp(d, block.job);
  }
}

/** The modes of a member's block as they turn out; place, person and earliest start as planned. */
function drawMember(
  d: Decoder,
  { block, planned }: Member,
  spreads: Readonly<Record<string, Spread>>,
  random: Random,
): Mode[] {
  const { shop } = d;
  const { indexes } = shop.joints;
  return planned.map((a, k) => {
    const s = block.first + k;
    const stage = shop.problem.jobs[block.job]!.stages[s - shop.jobs[block.job]!.first]!;
    const spread = spreads[stage.kind];
    d.spotOf[s] = indexes.place.get(a.place)!;
    d.handOf[s] = a.person === null ? -1 : indexes.person.get(a.person)!;
    d.wishOf[s] = a.start;
    return drawn(
      stage.modes.find((m) => m.id === a.mode)!,
      a,
      spread ? triangular(spread, random()) : 1,
    );
  });
}

/** The job is planned anew; a run that it led goes on for the others. */
function giveUp(d: Decoder, job: number): void {
  const { first, last } = d.shop.jobs[job]!;
  for (let s = first; s <= last; s++) if (d.shop.fixedAt[s]! < 0 && d.state.at.way[s]?.share === ALONE) takeOut(d, s);
  d.out[job] = 1;
}

/** The mode as it turns out: hands-on minutes by the factor, only the lamps that are planned. */
const drawn = (mode: Mode, a: Assignment, factor: number): Mode => ({
  ...mode,
  lamps: a.lamps,
  phases: mode.phases.map((p) =>
    byHand(p) && p.minutes > 0 ? { ...p, minutes: Math.max(1, Math.round(p.minutes * factor)) } : p,
  ),
});
