import { positive, QuantityError, temperature } from '#chemistry/quantity.ts';
import { balanceCelsius } from './balance-temperature.ts';
import type { LampSetup } from './energy-balance.ts';
import { heatUp } from './heat-up.ts';

/** Usual distances, metres (from memory, editable; the lamp maker's sheet decides). */
export const USUAL_DISTANCE_METRES = { nearest: 0.6, farthest: 0.9 } as const;

export type DistanceQuestion = Omit<LampSetup, 'distanceMetres'> & {
  wantedCelsius: number;
  /** The part's or vehicle's limit. */
  limitCelsius: number;
  /** Reach it in that time; where absent: come to rest there. */
  withinMinutes?: number | null;
  halfPowerMinutes?: number;
  nearestMetres?: number;
  farthestMetres?: number;
};

/** `metalCelsius` is what the panel comes to at `distanceMetres`. */
export type LampDistance =
  /** `restsAtCelsius`: where it would end if the lamp were left on; above the limit it must be pulsed or put out in time. */
  | { code: 'found'; distanceMetres: number; metalCelsius: number; restsAtCelsius: number; mustBePutOut: boolean }
  /** The wanted temperature is above the part's limit: no distance is offered. */
  | { code: 'above-limit'; wantedCelsius: number; limitCelsius: number }
  /** Even at the nearest distance the panel stays cooler. */
  | { code: 'too-weak'; distanceMetres: number; metalCelsius: number }
  /** Even at the farthest distance the panel gets hotter: less power, or pulses, or another lamp. */
  | { code: 'too-strong'; distanceMetres: number; metalCelsius: number };

const ROUNDS = 50;
/** The search looks past the part's limit on its way to an answer below it. */
const NO_LIMIT_CELSIUS = 1900;

/** The distance at which the metal comes to the wanted temperature, by bisection: farther is never hotter. */
export function lampDistance(question: DistanceQuestion): LampDistance {
  const { wantedCelsius, limitCelsius } = question;
  const nearest = positive('nearestMetres', question.nearestMetres ?? USUAL_DISTANCE_METRES.nearest);
  const farthest = positive('farthestMetres', question.farthestMetres ?? USUAL_DISTANCE_METRES.farthest);
  if (nearest >= farthest) throw new QuantityError('nearestMetres', nearest, `less than the farthest, ${farthest}`);
  if (temperature('wantedCelsius', wantedCelsius) > temperature('limitCelsius', limitCelsius)) {
    return { code: 'above-limit', wantedCelsius, limitCelsius };
  }
  const metalCelsius = (distanceMetres: number) => metalAt(question, distanceMetres);

  const hottest = metalCelsius(nearest);
  if (hottest < wantedCelsius) return { code: 'too-weak', distanceMetres: nearest, metalCelsius: hottest };
  const coolest = metalCelsius(farthest);
  if (coolest > wantedCelsius) return { code: 'too-strong', distanceMetres: farthest, metalCelsius: coolest };

  let [hotSide, coolSide] = [nearest, farthest];
  for (let round = 0; round < ROUNDS; round += 1) {
    const middle = (hotSide + coolSide) / 2;
    if (metalCelsius(middle) > wantedCelsius) hotSide = middle;
    else coolSide = middle;
  }
  // The cool side: the answer may be a hair under the wish, never over it.
  const restsAtCelsius = balanceCelsius(setupAt(question, coolSide));
  return {
    code: 'found',
    distanceMetres: coolSide,
    metalCelsius: metalCelsius(coolSide),
    restsAtCelsius,
    mustBePutOut: restsAtCelsius > limitCelsius,
  };
}

function setupAt({ lamp, panel, surroundings }: DistanceQuestion, distanceMetres: number): LampSetup {
  return { lamp, panel, surroundings, distanceMetres };
}

function metalAt(question: DistanceQuestion, distanceMetres: number): number {
  const { withinMinutes = null, halfPowerMinutes = 0, surroundings } = question;
  const setup = setupAt(question, distanceMetres);
  if (withinMinutes === null) return balanceCelsius(setup);
  const minutes = positive('withinMinutes', withinMinutes);
  const { trace } = heatUp({ ...setup, minutes, halfPowerMinutes, limitCelsius: NO_LIMIT_CELSIUS });
  return trace.at(-1)?.metalCelsius ?? surroundings.airCelsius;
}
