import { GAS_CONSTANT } from '#chemistry/constants.ts';
import type { Finding } from '#chemistry/finding.ts';
import { orderPoints, type PrintedPoint } from '#chemistry/printed-points.ts';
import { QuantityError } from '#chemistry/quantity.ts';
import { kelvinFromCelsius } from '#chemistry/units/temperature.ts';
import { USUAL_KILOJOULES_PER_MOLE } from './arrhenius.ts';

export type EnergyCode = 'activation-energy-unusually-low' | 'activation-energy-unusually-high';

/** kJ/mol that lead from one printed time to the other: `Ea = R ln(t1/t2) / (1/T1 - 1/T2)`. 0 where both times are equal. */
export function energyBetween(colder: PrintedPoint, hotter: PrintedPoint): number {
  const reciprocals = 1 / kelvinFromCelsius(colder.celsius) - 1 / kelvinFromCelsius(hotter.celsius);
  return (GAS_CONSTANT * Math.log(colder.minutes / hotter.minutes)) / reciprocals / 1000;
}

/**
 * Activation energy, kJ/mol, from the two points that a data sheet prints, usually air dry and bake.
 * "7 days at 22 C or 2 days at 60 C" is 26.95.
 *
 * @throws QuantityError where the hotter time is not shorter: such points tell nothing about temperature
 */
export function fitActivationEnergy(one: PrintedPoint, other: PrintedPoint): number {
  const [colder, hotter] = orderPoints([one, other]);
  if (hotter === undefined || hotter.minutes === colder.minutes) {
    throw new QuantityError('printed points', `${colder.minutes} min at both temperatures`, 'faster when hotter');
  }
  return energyBetween(colder, hotter);
}

export function unusualEnergy(kilojoulesPerMole: number): Finding<EnergyCode> | null {
  const { least, most } = USUAL_KILOJOULES_PER_MOLE;
  if (kilojoulesPerMole < least) {
    return { code: 'activation-energy-unusually-low', value: kilojoulesPerMole, limit: least };
  }
  if (kilojoulesPerMole > most) {
    return { code: 'activation-energy-unusually-high', value: kilojoulesPerMole, limit: most };
  }
  return null;
}
