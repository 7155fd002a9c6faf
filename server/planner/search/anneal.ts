import type { Random } from '../random.ts';
import { attempt, type Search } from './candidate.ts';
import { changeHands, changePlace, changeWay, type Move, moveBlock, moveJob, ruinJobs } from './moves.ts';

type Choice = { move: Move; weight: number; gain: number; tries: number };

export const makeChoices = (): Choice[] =>
  [moveBlock, moveJob, ruinJobs, changeWay, changeHands, changePlace].map((move) => ({ move, weight: 1, gain: 0, tries: 0 }));

function pickChoice(choices: readonly Choice[], random: Random): Choice {
  let at = random() * choices.reduce((sum, c) => sum + c.weight, 0);
  for (const c of choices) if ((at -= c.weight) < 0) return c;
  return choices[choices.length - 1]!;
}

/** Shifts the weights towards the moves that were accepted with a change of cost; none ever dies out. */
function adapt(choices: readonly Choice[]): void {
  const rates = choices.map((c) => c.gain / Math.max(1, c.tries));
  const most = Math.max(...rates);
  choices.forEach((c, i) => {
    if (most > 0) c.weight = 0.7 * c.weight + 0.3 * Math.max(0.1, rates[i]! / most);
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
  let best = s.cost;
  let heat0 = 0;
  for (let n = 0; ; n++) {
    const share = cooling.share();
    if (share >= 1) return;
    if (n % 200 === 199 && (globalThis as any).T?.adapt) adapt(choices);
    if ((globalThis as any).T?.stats && n % 3000 === 2999) { console.log(heat0.toFixed(0), s.cost, best, choices.map((c) => c.move.name + ' ' + c.tries + ' ' + (c as any).acc + ' ' + c.gain).join(', ')); for (const c of choices) { c.tries = c.gain = 0; (c as any).acc = 0; } }
    const heat = heat0 = cooling.hot * Math.pow(cooling.cold / cooling.hot, share);
    const choice = pickChoice(choices, random);
    const from = choice.move(s, random);
    choice.tries++;
    if (from < 0) continue;
    const before = s.cost;
    const limit = before - heat * Math.log(1 - random());
    if (!attempt(s, from, limit)) continue;
    (choice as any).acc = ((choice as any).acc ?? 0) + 1;
    if (s.cost < before - 1e-9) choice.gain++;
    if (s.cost < best - 1e-9) {
      best = s.cost;
      cooling.onBetter();
    }
  }
}
