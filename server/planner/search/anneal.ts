import type { Random } from '../random.ts';
import { attempt, attemptBlocks, type Search } from './candidate.ts';
import { changeHands, changePlace, changeWay, type Move, moveBlock, moveJob, moveJobs, ruin } from './moves.ts';

/** A neighbourhood and how often it is asked; `move` null: ruin some jobs and put them back into what is free. */
type Choice = { move: Move | null; base: number; weight: number; gain: number; tries: number };

/** Ruining a few jobs leaves the rest standing, costs a tenth of a re-decode, and pays most; so it is asked most. */
const RUIN = 6;
/** The moves in the order of blocks reach what ruining cannot: they let everything behind close up. */
const LIST = 0.3;
/** Tries after which the weights are set anew. */
const ADAPT = 500;

const makeChoices = (): Choice[] =>
  [null, moveBlock, moveJob, moveJobs, changeWay, changeHands, changePlace].map((move) => {
    const base = move ? LIST : RUIN;
    return { move, base, weight: base, gain: 0, tries: 0 };
  });

function pickChoice(choices: readonly Choice[], random: Random): Choice {
  let at = random() * choices.reduce((sum, c) => sum + c.weight, 0);
  for (const c of choices) if ((at -= c.weight) < 0) return c;
  return choices[choices.length - 1]!;
}

/** Leans towards what lowered the cost more often than the rest, by a factor of two at most either way. */
function adapt(choices: readonly Choice[]): void {
  const rates = choices.map((c) => c.gain / Math.max(1, c.tries));
  const mean = rates.reduce((x, y) => x + y, 0) / rates.length;
  choices.forEach((c, i) => {
    if (mean > 0) c.weight = c.base * Math.min(2, Math.max(0.5, rates[i]! / mean));
    c.gain = c.tries = 0;
  });
}

export type Cooling = {
  /** Share of this run that is over, 0 to 1, or more to end it. */
  share: () => number;
  hot: number;
  cold: number;
  /** Called after each acceptance that lowers the best cost. */
  onBetter: () => void;
};

/** Anneals from where the search stands. Temperatures fall geometrically with the share of the run. */
export function anneal(s: Search, random: Random, cooling: Cooling): void {
  const choices = makeChoices();
  // Ruined jobs leave holes: now and then everything is placed anew in the order of starts.
  const closeUp = 50 + Math.floor(s.order.length / 4);
  let best = s.cost;
  let accepted = 0;
  for (let n = 1; ; n++) {
    const share = cooling.share();
    if (share >= 1) return;
    if (n % ADAPT === 0) adapt(choices);
    const heat = cooling.hot * Math.pow(cooling.cold / cooling.hot, share);
    const before = s.cost;
    const choice = pickChoice(choices, random);
    choice.tries++;
    if (!tryMove(s, random, choice.move, before - heat * Math.log(1 - random()))) continue;
    if (s.cost < before - 1e-9) choice.gain++;
    if (choice.move === null && ++accepted % closeUp === 0) attempt(s, 0, s.cost);
    if (s.cost < best - 1e-9) {
      best = s.cost;
      cooling.onBetter();
    }
  }
}

function tryMove(s: Search, random: Random, move: Move | null, limit: number): boolean {
  if (move === null) return attemptBlocks(s, ruin(s, random), limit);
  const from = move(s, random);
  return from >= 0 && attempt(s, from, limit);
}
