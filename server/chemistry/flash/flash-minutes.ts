import type { Finding } from '#chemistry/finding.ts';
import { DEFAULT_KILOJOULES_PER_MOLE } from '#chemistry/cure/arrhenius.ts';
import { orderPoints, outsidePrinted, type PrintedPoint, type RangeCode } from '#chemistry/printed-points.ts';
import { between } from '#chemistry/quantity.ts';
import { wholeMinutesUp } from '#chemistry/rounding.ts';
import { humidityFactor, type HumidityStep } from './humidity-factor.ts';
import { minutesFromPoints } from './minutes-from-points.ts';

export type FlashCode = RangeCode | 'temperature-scaling-assumed' | 'humidity-factor-applied';

export type FlashQuestion = {
  /** The data sheet's flash or air-dry times; one point is enough. */
  printed: readonly PrintedPoint[];
  airCelsius: number;
  relativeHumidityPercent: number;
  /** The shop's own stretch for damp air; none where empty. */
  humiditySteps?: readonly HumidityStep[];
  /** For a sheet of a single point. */
  kilojoulesPerMole?: number;
};

export type FlashMinutes = {
  minutes: number;
  /** Least minutes to wait, rounded up. The look of the film has the last word: the painter confirms. */
  wholeMinutes: number;
  humidityFactor: number;
  findings: Finding<FlashCode>[];
};

/**
 * Least flash or air-dry minutes in this air. Between a sheet's own points the time follows Arrhenius from point to point;
 * from a single point it follows the default energy of 50 kJ/mol (from memory), with a finding that says so. No published
 * formula joins flash and humidity: that part is the shop's own factor and never shortens a time.
 */
export function flashMinutes(question: FlashQuestion): FlashMinutes {
  const points = orderPoints(question.printed);
  const { airCelsius, kilojoulesPerMole = DEFAULT_KILOJOULES_PER_MOLE } = question;
  const percent = between('relativeHumidityPercent', question.relativeHumidityPercent, 0, 100);
  const factor = humidityFactor(percent, question.humiditySteps ?? []);
  const minutes = minutesFromPoints(points, airCelsius, kilojoulesPerMole) * factor.factor;

  const findings: Finding<FlashCode>[] = [];
  const hottest = points.at(-1) ?? points[0];
  const outside = outsidePrinted(airCelsius, points[0].celsius, hottest.celsius);
  if (points.length === 1 && outside !== null) {
    findings.push({
      code: 'temperature-scaling-assumed',
      value: kilojoulesPerMole,
      limit: DEFAULT_KILOJOULES_PER_MOLE,
    });
  }
  if (outside !== null) findings.push(outside);
  if (factor.factor > 1) {
    findings.push({ code: 'humidity-factor-applied', value: percent, limit: factor.abovePercent });
  }
  return { minutes, wholeMinutes: wholeMinutesUp(minutes), humidityFactor: factor.factor, findings };
}
