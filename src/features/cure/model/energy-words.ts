import type { Energy } from './bakes.ts';
import { plainNumber } from './typed.ts';

export const energyWords = ({ kilojoulesPerMole, from }: Energy): string => {
  const figure = `${plainNumber(kilojoulesPerMole, 1)} kJ/mol`;
  if (from === 'sheet') return `${figure}, fitted to the sheet's air-dry and bake lines`;
  if (from === 'set') return `${figure}, as the shop set it on the data sheet`;
  return from === 'typed' ? `${figure}, as you typed it` : `${figure}, a default from memory`;
};

export const contradictionWords =
  'The sheet’s hotter line is no faster than its colder one: one of them is mistyped. Only the bake line is used.';
