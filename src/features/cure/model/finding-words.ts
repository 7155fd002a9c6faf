import type { AirCode } from '#chemistry/air/air-standing.ts';
import type { CureCode } from '#chemistry/cure/cure-minutes-at.ts';
import type { Finding } from '#chemistry/finding.ts';
import type { FlashCode } from '#chemistry/flash/flash-minutes.ts';
import { limitForDisplay } from '#chemistry/units/temperature.ts';
import { plainNumber, unitFromCelsius, type Unit } from './typed.ts';

export type DeskCode = AirCode | CureCode | FlashCode | 'above-heat-limit';

/** `52.4 °C`. */
export const degrees = (celsius: number, unit: Unit, decimals = 1): string =>
  `${plainNumber(unitFromCelsius(celsius, unit), decimals)} °${unit}`;

/** A limit never reads higher than it is: 48.889 C is 48.8. */
export const limitDegrees = (celsius: number, unit: Unit): string =>
  `${plainNumber(limitForDisplay(unitFromCelsius(celsius, unit), 1), 1)} °${unit}`;

/** A finding of the chemistry as a sentence in the reader's unit. */
export function findingWords({ code, value, limit }: Finding<DeskCode>, unit: Unit): string {
  const [at, edge] = [degrees(value, unit), degrees(limit, unit)];
  switch (code) {
    case 'too-cold-to-spray':
      return `At ${at} do not spray: never under ${edge}. Warm the shop and the part first.`;
    case 'cooler-than-best':
      return `Cooler than the best air (from ${edge}): films stay wet longer and may run.`;
    case 'warmer-than-best':
      return `Warmer than the best air (up to ${edge}): films skin over early; use a slower reducer.`;
    case 'drier-than-best':
      return `Drier than the best air (from ${plainNumber(limit, 0)} %): dry spray is likelier.`;
    case 'damper-than-best':
      return `Damper than the best air (up to ${plainNumber(limit, 0)} %): waterborne films flash slowly; watch the look.`;
    case 'below-printed-temperatures':
      return `${at} is colder than the sheet's coldest line (${edge}): reckoned beyond what its maker printed.`;
    case 'above-printed-temperatures':
      return `${at} is hotter than the sheet's hottest line (${edge}): reckoned beyond what its maker printed.`;
    case 'temperature-scaling-assumed':
      return `The sheet prints one temperature only; scaled by a default of ${plainNumber(value, 0)} kJ/mol, from memory.`;
    case 'humidity-factor-applied':
      return `Stretched by your shop's own factor for damp air; no formula for it has been published.`;
    case 'activation-energy-assumed':
      return `No second temperature to fit the energy to: a default of ${plainNumber(value, 0)} kJ/mol, from memory, is used.`;
    case 'activation-energy-unusually-low':
      return `${plainNumber(value, 1)} kJ/mol is unusually low (under ${limit}): look whether the times are typed right.`;
    case 'activation-energy-unusually-high':
      return `${plainNumber(value, 1)} kJ/mol is unusually high (over ${limit}): look whether the times are typed right.`;
    case 'above-heat-limit':
      return `It reached ${at}, above the limit of ${limitDegrees(limit, unit)}: look at part and vehicle for damage.`;
  }
}
