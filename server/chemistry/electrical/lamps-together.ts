import { HAIR } from '#chemistry/constants.ts';
import { positive } from '#chemistry/quantity.ts';
import { amperesFromKilowatts } from './amperes.ts';
import { usableKilowatts, type LampCircuit, type Usage } from './circuit.ts';

export type LampsTogether = {
  /** True where all the lamps may burn at once. */
  allFit: boolean;
  /** The most lamps that may burn at once: places in the list given, smallest lamps first. */
  together: number[];
  togetherKilowatts: number;
  togetherAmperes: number;
  usableKilowatts: number;
  /** What all of them would draw, to show beside the limit. */
  allKilowatts: number;
};

/** How many of these lamps run together on the circuit. */
export function lampsTogether(lampKilowatts: readonly number[], circuit: LampCircuit, usage: Usage): LampsTogether {
  const usable = usableKilowatts(circuit, usage);
  const bySize = lampKilowatts
    .map((kilowatts, place) => ({ place, kilowatts: positive('lamp kilowatts', kilowatts) }))
    .toSorted((a, b) => a.kilowatts - b.kilowatts || a.place - b.place);

  let togetherKilowatts = 0;
  const together: number[] = [];
  for (const { place, kilowatts } of bySize) {
    if (togetherKilowatts + kilowatts > usable + HAIR) break;
    togetherKilowatts += kilowatts;
    together.push(place);
  }
  return {
    allFit: together.length === lampKilowatts.length,
    together: together.toSorted((a, b) => a - b),
    togetherKilowatts,
    togetherAmperes: amperesFromKilowatts(togetherKilowatts, circuit),
    usableKilowatts: usable,
    allKilowatts: lampKilowatts.reduce((sum, kilowatts) => sum + kilowatts, 0),
  };
}
