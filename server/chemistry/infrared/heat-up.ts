import { KELVIN_OFFSET } from '#chemistry/constants.ts';
import type { TraceRow } from '#chemistry/cure/trace.ts';
import { QuantityError, temperature, zeroOrMore } from '#chemistry/quantity.ts';
import { balanceKelvin } from './balance-temperature.ts';
import { energyBalance, lossSlope, lostWatts, type Balance, type LampSetup } from './energy-balance.ts';

export type HeatUpQuestion = LampSetup & {
  minutes: number;
  /** The part's limit: the reckoning stops there and says when. Must be above the start. */
  limitCelsius: number;
  /** Half power for so long first, so that solvent leaves before the film closes. Default 0; 3 to 6 min from memory. */
  halfPowerMinutes?: number;
  /** The room's temperature where absent. */
  startCelsius?: number;
};

export type HeatUp = {
  /** Metal temperature over time, ready for `equivalentMinutes`; ends at the limit where that is reached. */
  trace: TraceRow[];
  outcome: { code: 'within-limit' } | { code: 'limit-reached'; atMinute: number; limitCelsius: number };
};

/** Steps per time constant of the panel at its hottest: holds the error of the fourth-order steps below 1e-4 C. */
const STEPS_PER_TIME_CONSTANT = 20;
/** Nearer than this to the balance the panel is there. */
const SETTLED_KELVIN = 1e-6;

/**
 * A panel under a lamp, as one lump: `C dT/dt = absorbed - emitted - convected`, by classic Runge-Kutta with steps of a
 * twentieth of the shortest time constant (error below 1e-4 C, shown by halving the steps and by the separated integral in
 * the tests). Never reckons past the part's limit.
 *
 * @throws QuantityError for a start at or above the limit, or figures that cannot be
 */
export function heatUp(question: HeatUpQuestion): HeatUp {
  const { minutes, limitCelsius, halfPowerMinutes = 0, startCelsius = question.surroundings.airCelsius } = question;
  const balance = energyBalance(question);
  zeroOrMore('minutes', minutes);
  zeroOrMore('halfPowerMinutes', halfPowerMinutes);
  const limit = temperature('limitCelsius', limitCelsius) + KELVIN_OFFSET;
  const start = temperature('startCelsius', startCelsius) + KELVIN_OFFSET;
  if (start >= limit) throw new QuantityError('startCelsius', startCelsius, `below the limit of ${limitCelsius}`);

  const run: Run = { balance, limit, seconds: 0, kelvin: start, trace: [row(0, start)] };
  const change = Math.min(halfPowerMinutes, minutes) * 60;
  const reached = advance(run, 0.5, change) || advance(run, 1, minutes * 60);
  if (!reached) return { trace: run.trace, outcome: { code: 'within-limit' } };
  return { trace: run.trace, outcome: { code: 'limit-reached', atMinute: run.seconds / 60, limitCelsius } };
}

type Run = { balance: Balance; limit: number; seconds: number; kelvin: number; trace: TraceRow[] };

function row(seconds: number, kelvin: number): TraceRow {
  return { minutes: seconds / 60, metalCelsius: kelvin - KELVIN_OFFSET };
}

/** Runs at one power until `until` seconds; true where the limit was reached first. */
function advance(run: Run, power: number, until: number): boolean {
  const { balance, limit } = run;
  const end = balanceKelvin(balance, power);
  const shortest = balance.joulesPerKelvin / lossSlope(balance, Math.max(end, run.kelvin));
  const longestStep = shortest / STEPS_PER_TIME_CONSTANT;
  while (run.seconds < until) {
    const settled = Math.abs(end - run.kelvin) < SETTLED_KELVIN;
    const step = settled ? until - run.seconds : Math.min(longestStep, until - run.seconds);
    const next = settled ? run.kelvin : rungeKutta(balance, power, run.kelvin, step);
    const reached = next >= limit;
    const taken = reached ? stepToLimit(run, power, step) : step;
    run.seconds = taken === until - run.seconds ? until : run.seconds + taken;
    run.kelvin = reached ? limit : next;
    run.trace.push(row(run.seconds, run.kelvin));
    if (reached) return true;
  }
  return false;
}

/** The part of a step after which the limit is met: bisection, since the panel only warms on its way there. */
function stepToLimit({ balance, limit, kelvin }: Run, power: number, step: number): number {
  let [early, late] = [0, step];
  for (let round = 0; round < 40; round += 1) {
    const middle = (early + late) / 2;
    if (rungeKutta(balance, power, kelvin, middle) < limit) early = middle;
    else late = middle;
  }
  return late;
}

function rungeKutta(balance: Balance, power: number, kelvin: number, seconds: number): number {
  const rate = (at: number) => (balance.absorbedWatts * power - lostWatts(balance, at)) / balance.joulesPerKelvin;
  const first = rate(kelvin);
  const second = rate(kelvin + (first * seconds) / 2);
  const third = rate(kelvin + (second * seconds) / 2);
  const fourth = rate(kelvin + third * seconds);
  return kelvin + (seconds * (first + 2 * second + 2 * third + fourth)) / 6;
}
