import type { Finding } from '#chemistry/finding.ts';
import { orderPoints, type PrintedPoint } from '#chemistry/printed-points.ts';
import { activationEnergy, DEFAULT_KILOJOULES_PER_MOLE } from './arrhenius.ts';
import { fitActivationEnergy, unusualEnergy, type EnergyCode } from './fit-activation-energy.ts';

/** What all cure questions need to know of a coating. The reference is the hottest printed point: the bake. */
export type Kinetics = {
  referenceCelsius: number;
  referenceMinutes: number;
  kilojoulesPerMole: number;
  /** The printed range; outside it every answer carries a warning. */
  coldestCelsius: number;
  hottestCelsius: number;
  findings: Finding<KineticsCode>[];
};

export type KineticsCode = EnergyCode | 'activation-energy-assumed';

/**
 * Kinetics of a coating from its data sheet's cure times. Two or more points: the energy is fitted to the coldest and the
 * hottest of them. One point: the shop's default energy, with a finding that says so.
 *
 * @throws QuantityError for points that cannot be, or that do not get faster when hotter
 */
export function cureKinetics(
  printed: readonly PrintedPoint[],
  defaultKilojoulesPerMole: number = DEFAULT_KILOJOULES_PER_MOLE,
): Kinetics {
  const points = orderPoints(printed);
  const coldest = points[0];
  const hottest = points.at(-1) ?? coldest;
  const fitted = points.length > 1;
  const energy = fitted ? fitActivationEnergy(coldest, hottest) : activationEnergy(defaultKilojoulesPerMole);

  const findings: Finding<KineticsCode>[] = [];
  if (!fitted) findings.push({ code: 'activation-energy-assumed', value: energy, limit: DEFAULT_KILOJOULES_PER_MOLE });
  const unusual = unusualEnergy(energy);
  if (unusual !== null) findings.push(unusual);

  return {
    referenceCelsius: hottest.celsius,
    referenceMinutes: hottest.minutes,
    kilojoulesPerMole: energy,
    coldestCelsius: coldest.celsius,
    hottestCelsius: hottest.celsius,
    findings,
  };
}
