import { DEFAULT_KILOJOULES_PER_MOLE } from '#chemistry/cure/arrhenius.ts';
import { energyBetween } from '#chemistry/cure/fit-activation-energy.ts';
import type { SheetFigures } from './figures.ts';

export type SheetEnergy = {
  kilojoulesPerMole: number;
  /** Set by the shop; fitted to the sheet's air-dry and bake lines; or the default (50 kJ/mol, from memory). */
  from: 'set' | 'fitted' | 'default';
};

/** The activation energy a sheet's cure follows. Two lines of which the hotter is no faster tell nothing: the default. */
export function energyOfSheet({
  kilojoulesPerMole,
  airDry,
  bake,
}: Pick<SheetFigures, 'kilojoulesPerMole' | 'airDry' | 'bake'>): SheetEnergy {
  if (kilojoulesPerMole !== null) return { kilojoulesPerMole, from: 'set' };
  if (!airDry || !bake || linesContradict(airDry, bake))
    return { kilojoulesPerMole: DEFAULT_KILOJOULES_PER_MOLE, from: 'default' };
  return { kilojoulesPerMole: energyBetween(airDry, bake), from: 'fitted' };
}

/** Not hotter, or hotter and not faster: one of the two lines is mistyped, or they mean different things. */
export const linesContradict = (
  airDry: { minutes: number; celsius: number },
  bake: { minutes: number; celsius: number },
): boolean => bake.celsius <= airDry.celsius || bake.minutes >= airDry.minutes;
