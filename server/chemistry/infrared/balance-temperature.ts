import { KELVIN_OFFSET, STEFAN_BOLTZMANN } from '#chemistry/constants.ts';
import { between } from '#chemistry/quantity.ts';
import { energyBalance, lossSlope, lostWatts, type Balance, type LampSetup } from './energy-balance.ts';

/**
 * The temperature at which the panel loses what it takes in, C: where it would end if the lamp burned for ever. The room's own
 * temperature where no lamp burns. `power` is the share of full power, 0 to 1. Error below 1e-6 C.
 */
export function balanceCelsius(setup: LampSetup, power = 1): number {
  return balanceKelvin(energyBalance(setup), between('power', power, 0, 1)) - KELVIN_OFFSET;
}

export function balanceKelvin(balance: Balance, power: number): number {
  const absorbed = balance.absorbedWatts * power;
  // Without convection it would be this hot; Newton from above on a rising, convex loss comes down without overshooting.
  let kelvin = (absorbed / (balance.emissivity * STEFAN_BOLTZMANN) + balance.roomKelvin ** 4) ** 0.25;
  for (let round = 0; round < 100; round += 1) {
    const step = (lostWatts(balance, kelvin) - absorbed) / lossSlope(balance, kelvin);
    kelvin -= step;
    if (Math.abs(step) < 1e-9) break;
  }
  return Math.max(kelvin, balance.roomKelvin);
}
