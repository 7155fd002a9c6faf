import type { DayView } from '#contracts/day.ts';
import { amperesFromKilowatts, type Phases, type Supply } from '#chemistry/electrical/amperes.ts';
import { usableAmperes, usageFor, type Usage } from '#chemistry/electrical/circuit.ts';
import { lampsTogether, type LampsTogether } from '#chemistry/electrical/lamps-together.ts';
import { smallestBreaker } from '#chemistry/electrical/smallest-breaker.ts';
import { readRows, type Values } from './desk-state.ts';
import { numberFault, reader, type Answer } from './reader.ts';
import type { Unit } from './typed.ts';

export type Lamp = { name: string; kilowatts: number };
export type ShopCircuit = { id: string; name: string; kilowatts: number; lamps: Lamp[] };

/** The shop's lamps by the circuit they hang on. */
export function shopCircuits({ circuits, rows }: Pick<DayView, 'circuits' | 'rows'>): ShopCircuit[] {
  return circuits.map((circuit) => ({
    ...circuit,
    lamps: rows
      .filter((row) => row.kind === 'lamp' && row.circuitId === circuit.id)
      .flatMap(({ name, kilowatts }) => (kilowatts !== null && kilowatts > 0 ? [{ name, kilowatts }] : [])),
  }));
}

export type CircuitAnswer = LampsTogether & {
  lamps: Lamp[];
  eachAmperes: number[];
  allAmperes: number;
  /** By the breaker, or what the shop's limit in kW comes to. */
  limitAmperes: number;
  usableAmperes: number;
  usage: Usage;
  continuous: boolean;
  /** For all lamps at once. */
  breakerForAll: number | null;
};

/** `shop`: lamps and limit of a circuit of the shop; null: lamps and breaker are typed. */
export function circuitAnswer(values: Values, shop: ShopCircuit | null, unit: Unit): Answer<CircuitAnswer> {
  const read = reader(values, unit);
  const volts = read.number('volts', { least: 12, most: 1000 });
  const minutes = read.number('hold', { least: 1, most: 1440 });
  const phases: Phases = values.phases === '1' ? 1 : 3;
  const typedAmperes = shop ? NaN : read.number('amps', { least: 1, most: 1000 });
  const typedLamps = shop
    ? []
    : readRows(values.kws).map(([text = ''], i) => {
        const found = numberFault(text, { least: 0.1, most: 60 });
        if (typeof found === 'string') read.errors[`kws.${i}`] = found;
        return { name: `Lamp ${i + 1}`, kilowatts: typeof found === 'number' ? found : NaN };
      });
  return read.answer(() => {
    const supply: Supply = { volts, phases };
    const lamps = shop?.lamps ?? typedLamps;
    const limitAmperes = shop ? amperesFromKilowatts(shop.kilowatts, supply) : typedAmperes;
    const usage = usageFor(minutes, values.eighty === 'yes');
    const circuit = { ...supply, breakerAmperes: limitAmperes };
    const answer = lampsTogether(
      lamps.map(({ kilowatts }) => kilowatts),
      circuit,
      usage,
    );
    const allAmperes = amperesFromKilowatts(answer.allKilowatts, supply);
    return {
      ...answer,
      lamps,
      eachAmperes: lamps.map(({ kilowatts }) => amperesFromKilowatts(kilowatts, supply)),
      allAmperes,
      limitAmperes,
      usableAmperes: usableAmperes(circuit, usage),
      usage,
      continuous: minutes >= 180,
      breakerForAll: smallestBreaker(allAmperes, usage, volts < 220 ? 'north-america' : 'europe'),
    };
  });
}
