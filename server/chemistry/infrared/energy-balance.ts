import { KELVIN_OFFSET, STEFAN_BOLTZMANN } from '#chemistry/constants.ts';
import { fraction, positive, temperature, zeroOrMore } from '#chemistry/quantity.ts';
import { viewFactor } from './view-factor.ts';

export type CureLamp = {
  kilowatts: number;
  /** The lit face, taken as an evenly glowing rectangle; the same area of panel faces it. */
  widthMetres: number;
  heightMetres: number;
  /** Share of the electric power that leaves as radiation towards the panel. Default 0.85, from memory. */
  radiantFraction?: number;
};

export type Panel = {
  joulesPerSquareMetreKelvin: number;
  /** Of the coat, for what it takes from the lamp. Default 0.9. */
  absorptance?: number;
  /** Of the coat, for what it gives off. Default 0.9. */
  emissivity?: number;
};

export type Surroundings = {
  airCelsius: number;
  /** Free convection. Default 5 W/(m2 K). */
  convectionWattsPerSquareMetreKelvin?: number;
};

/** One lamp square before one panel, in a room. The panel loses heat from its face only: the warm, cautious side. */
export type LampSetup = { lamp: CureLamp; panel: Panel; surroundings: Surroundings; distanceMetres: number };

/** The setup boiled down to five figures, all checked. Kelvin inside, since radiation goes with its fourth power. */
export type Balance = {
  /** At full power, W/m2. */
  absorbedWatts: number;
  roomKelvin: number;
  convection: number;
  emissivity: number;
  joulesPerKelvin: number;
};

export function energyBalance({ lamp, panel, surroundings, distanceMetres }: LampSetup): Balance {
  const { widthMetres, heightMetres, radiantFraction = 0.85 } = lamp;
  const { absorptance = 0.9, emissivity = 0.9 } = panel;
  const { airCelsius, convectionWattsPerSquareMetreKelvin: convection = 5 } = surroundings;
  const lit = viewFactor({ widthMetres, heightMetres, distanceMetres });
  const watts = zeroOrMore('kilowatts', lamp.kilowatts) * 1000 * fraction('radiantFraction', radiantFraction);
  return {
    // Equal areas: what falls on a square metre of panel is the lamp's watts per square metre times the view factor.
    absorbedWatts: (fraction('absorptance', absorptance) * watts * lit) / (widthMetres * heightMetres),
    roomKelvin: temperature('airCelsius', airCelsius) + KELVIN_OFFSET,
    convection: zeroOrMore('convectionWattsPerSquareMetreKelvin', convection),
    emissivity: fraction('emissivity', emissivity),
    joulesPerKelvin: positive('joulesPerSquareMetreKelvin', panel.joulesPerSquareMetreKelvin),
  };
}

/** What a panel at that temperature loses to the room, W/m2: at 60 C in 20 C, emissivity 0.9: 251.8 + 200 by convection. */
export function lostWatts(balance: Balance, kelvin: number): number {
  const { emissivity, roomKelvin, convection } = balance;
  return emissivity * STEFAN_BOLTZMANN * (kelvin ** 4 - roomKelvin ** 4) + convection * (kelvin - roomKelvin);
}

/** Change of the loss per kelvin, W/(m2 K). */
export function lossSlope({ emissivity, convection }: Balance, kelvin: number): number {
  return 4 * emissivity * STEFAN_BOLTZMANN * kelvin ** 3 + convection;
}
