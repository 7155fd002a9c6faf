import * as z from 'zod';
import { amperesFromKilowatts } from '#chemistry/electrical/amperes.ts';
import { usableKilowatts, type LampCircuit } from '#chemistry/electrical/circuit.ts';
import { lampsTogether } from '#chemistry/electrical/lamps-together.ts';
import type { Circuit, CircuitFields, Lamp, LampFields } from '#contracts/lamps.ts';
import { readTyped, typedMaybe, typedName, typedNumber, typedOf } from '../../parts/typed.ts';
import { readWith, type FormRead } from '../../parts/use-typed-form.ts';

export type CircuitForm = { name: string; kilowatts: string; volts: string; phases: '1' | '3'; breaker: string };

export const newCircuit: CircuitForm = { name: '', kilowatts: '', volts: '', phases: '3', breaker: '' };
export const circuitForm = (circuit: Circuit): CircuitForm => ({
  name: circuit.name,
  kilowatts: String(circuit.kilowatts),
  volts: typedOf(circuit.volts),
  phases: circuit.phases === 1 ? '1' : '3',
  breaker: typedOf(circuit.breakerAmperes),
});

const kilowatts = { min: 0.01, max: 10_000 };

export const readCircuitForm = (form: CircuitForm): FormRead<CircuitForm, CircuitFields> =>
  readWith(
    z
      .object({
        name: typedName,
        kilowatts: typedNumber(kilowatts),
        volts: typedMaybe({ min: 1, max: 1000 }),
        phases: z.enum(['1', '3']),
        breaker: typedMaybe({ min: 1, max: 1000 }),
      })
      .transform(({ phases, breaker, ...rest }) => ({
        ...rest,
        phases: rest.volts === null ? null : phases === '1' ? (1 as const) : (3 as const),
        breakerAmperes: breaker,
      })),
    form,
  );

export type LampForm = { name: string; circuitId: string; kilowatts: string; wave: 'short' | 'medium' };
export const newLamp = (circuitId: string): LampForm => ({ name: '', circuitId, kilowatts: '', wave: 'short' });
export const lampForm = ({ name, circuitId, kilowatts, wave }: Lamp): LampForm => ({
  name,
  circuitId,
  kilowatts: String(kilowatts),
  wave,
});
export const readLampForm = (form: LampForm): FormRead<LampForm, LampFields> =>
  readWith(
    z.object({
      name: typedName,
      circuitId: z.string().min(1, 'Choose a circuit.'),
      kilowatts: typedNumber(kilowatts),
      wave: z.enum(['short', 'medium']),
    }),
    form,
  );

/** What the breaker lets lamps draw, kW to two decimals and never more; null where volts or amperes are missing. */
export function kilowattsOf({ volts, phases, breaker }: CircuitForm): { full: number; eighty: number } | null {
  const [v, a] = [readTyped(volts), readTyped(breaker)];
  if (v === null || a === null || v <= 0 || a <= 0) return null;
  const circuit: LampCircuit = { volts: v, phases: phases === '1' ? 1 : 3, breakerAmperes: a };
  const down = (kw: number) => Math.floor(kw * 100 + 1e-6) / 100;
  return { full: down(usableKilowatts(circuit, 'full')), eighty: down(usableKilowatts(circuit, 'eighty-percent')) };
}

export type Together = {
  /** Names of the most lamps that may burn at once, smallest first. */
  together: string[];
  allFit: boolean;
  togetherKilowatts: number;
  allKilowatts: number;
  /** What all of them draw; null where the voltage was not entered. */
  allAmperes: number | null;
};

/** Which of a circuit's lamps may burn at once, by the kilowatts that were entered for it. */
export function togetherOn(circuit: Circuit, lamps: readonly Lamp[]): Together {
  const supply = { volts: circuit.volts ?? 230, phases: circuit.phases ?? (1 as const) };
  // The limit in kilowatts decides; the breaker is not held against it a second time.
  const found = lampsTogether(
    lamps.map((lamp) => lamp.kilowatts),
    { ...supply, breakerAmperes: 1e9, kilowattLimit: circuit.kilowatts },
    'full',
  );
  return {
    together: found.together.map((place) => lamps[place]?.name ?? ''),
    allFit: found.allFit,
    togetherKilowatts: found.togetherKilowatts,
    allKilowatts: found.allKilowatts,
    allAmperes: circuit.volts === null ? null : amperesFromKilowatts(found.allKilowatts, supply),
  };
}
