import { GAS_CONSTANT } from '#chemistry/constants.ts';
import { between, positive } from '#chemistry/quantity.ts';
import { kelvinFromCelsius } from '#chemistry/units/temperature.ts';

/**
 * Default activation energy, kJ/mol (from memory; an editable default). Data sheets imply 23 to 47, since their clock
 * includes the loss of solvent; the chemistry of polyurethanes alone is 50 to 84 (DSC papers).
 */
export const DEFAULT_KILOJOULES_PER_MOLE = 50;

/** Outside this range a pair of printed times is more likely mistyped than true. */
export const USUAL_KILOJOULES_PER_MOLE = { least: 20, most: 90 } as const;

export function activationEnergy(kilojoulesPerMole: number): number {
  return between('kilojoulesPerMole', positive('kilojoulesPerMole', kilojoulesPerMole), 0, 1000);
}

/**
 * Minutes at `celsius` for one minute at `referenceCelsius`: `exp(Ea/R * (1/T - 1/Tref))` in kelvin (Arrhenius). At the
 * reference it is 1; hotter it is less. With 50 kJ/mol 60 C to 20 C is 11.74.
 */
export function timeRatio(celsius: number, referenceCelsius: number, kilojoulesPerMole: number): number {
  const perKelvin = (activationEnergy(kilojoulesPerMole) * 1000) / GAS_CONSTANT;
  return Math.exp(perKelvin * (1 / kelvinFromCelsius(celsius) - 1 / kelvinFromCelsius(referenceCelsius)));
}

/** How much faster the cure runs at `celsius` than at the reference: the time ratio turned over. */
export function rateRatio(celsius: number, referenceCelsius: number, kilojoulesPerMole: number): number {
  return timeRatio(referenceCelsius, celsius, kilojoulesPerMole);
}
