import { between, temperature } from '#chemistry/quantity.ts';
import type { Finding } from '#chemistry/finding.ts';
import type { Air } from './dew-point.ts';

export type AirRanges = {
  bestCelsius: readonly [from: number, to: number];
  bestHumidityPercent: readonly [from: number, to: number];
  neverBelowCelsius: number;
};

/** A waterborne maker's sheet (published): best 18 to 25 C and 40 to 70 %, never under 15 C. A shop may set its own. */
export const DEFAULT_AIR_RANGES: AirRanges = {
  bestCelsius: [18, 25],
  bestHumidityPercent: [40, 70],
  neverBelowCelsius: 15,
};

export type AirCode =
  'too-cold-to-spray' | 'cooler-than-best' | 'warmer-than-best' | 'drier-than-best' | 'damper-than-best';

export type AirStanding = { standing: 'best' | 'outside-best' | 'never'; findings: Finding<AirCode>[] };

/** Is this air good to spray in? Humidity only ever warns: no published formula turns it into a refusal. */
export function airStanding(air: Air, ranges: AirRanges = DEFAULT_AIR_RANGES): AirStanding {
  const celsius = temperature('airCelsius', air.airCelsius);
  const percent = between('relativeHumidityPercent', air.relativeHumidityPercent, 0, 100);
  const findings: Finding<AirCode>[] = [];
  const note = (code: AirCode, value: number, limit: number) => findings.push({ code, value, limit });

  const never = celsius < ranges.neverBelowCelsius;
  if (never) note('too-cold-to-spray', celsius, ranges.neverBelowCelsius);
  else if (celsius < ranges.bestCelsius[0]) note('cooler-than-best', celsius, ranges.bestCelsius[0]);
  else if (celsius > ranges.bestCelsius[1]) note('warmer-than-best', celsius, ranges.bestCelsius[1]);
  if (percent < ranges.bestHumidityPercent[0]) note('drier-than-best', percent, ranges.bestHumidityPercent[0]);
  else if (percent > ranges.bestHumidityPercent[1]) note('damper-than-best', percent, ranges.bestHumidityPercent[1]);

  if (never) return { standing: 'never', findings };
  return { standing: findings.length === 0 ? 'best' : 'outside-best', findings };
}
