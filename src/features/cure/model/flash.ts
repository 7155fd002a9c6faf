import { airStanding, type AirCode } from '#chemistry/air/air-standing.ts';
import { suggestReducerSpeed, type ReducerSpeed } from '#chemistry/air/reducer-speed.ts';
import { bakeMinutesOnTheClock } from '#chemistry/cure/bake-minutes.ts';
import type { Finding } from '#chemistry/finding.ts';
import { flashMinutes, type FlashCode } from '#chemistry/flash/flash-minutes.ts';
import type { PrintedPoint } from '#chemistry/printed-points.ts';
import type { Values } from './desk-state.ts';
import { ranges, reader, type Answer } from './reader.ts';
import { cureOf, flashCelsius, type Sheet } from './sheet-of.ts';
import type { Unit } from './typed.ts';

export type TimeRow = {
  key: 'between' | 'next' | 'heat' | 'dry';
  /** As printed; 0 where the sheet asks for none. */
  printed: number;
  printedCelsius: number;
  /** In today's air, rounded up. */
  today: number;
};

export type FlashAnswer = {
  rows: TimeRow[];
  bake: { minutes: number; celsius: number; measuredAt: 'metal' | 'air'; heatUp: number; onTheClock: number } | null;
  standing: 'best' | 'outside-best' | 'never';
  reducer: ReducerSpeed;
  findings: Finding<AirCode | FlashCode>[];
};

/** Least times of a sheet in today's air. */
export function flashAnswer(values: Values, sheet: Sheet, unit: Unit): Answer<FlashAnswer> {
  const read = reader(values, unit);
  const airCelsius = read.celsius('air', ranges.air);
  const relativeHumidityPercent = read.number('rh', ranges.humidity);
  const factor = read.number('damp', { least: 1, most: 10 });
  const heatUp = read.number('heatup', { least: 0, most: 240 });
  return read.answer(() => {
    const air = { airCelsius, relativeHumidityPercent };
    const humiditySteps = [{ abovePercent: 0, factor }];
    const findings: Finding<AirCode | FlashCode>[] = [...airStanding(air).findings];
    const timed = (key: TimeRow['key'], printed: PrintedPoint[]): TimeRow => {
      const first = printed[0] ?? { minutes: 0, celsius: 20 };
      if (first.minutes === 0) return { key, printed: 0, printedCelsius: first.celsius, today: 0 };
      const answer = flashMinutes({ printed, ...air, humiditySteps });
      for (const finding of answer.findings)
        if (!findings.some(({ code }) => code === finding.code)) findings.push(finding);
      return { key, printed: first.minutes, printedCelsius: first.celsius, today: answer.wholeMinutes };
    };
    const celsius = flashCelsius(sheet);
    const rows = [
      timed('between', [{ minutes: sheet.flashBetweenCoats, celsius }]),
      timed('next', [{ minutes: sheet.flashBeforeNext, celsius }]),
      timed('heat', [{ minutes: sheet.flashBeforeHeat, celsius }]),
      ...(sheet.airDry ? [timed('dry', dryPoints(sheet))] : []),
    ];
    return {
      rows,
      bake: bakeOf(sheet, heatUp),
      ...airStanding(air),
      reducer: suggestReducerSpeed(airCelsius),
      findings,
    };
  });
}

/** Air dry and bake are two points of one line, unless they contradict each other. */
function dryPoints(sheet: Sheet): PrintedPoint[] {
  const points = [sheet.airDry, sheet.bake]
    .filter((point) => point !== null)
    .map(({ minutes, celsius }) => ({ minutes, celsius }));
  return cureOf(sheet, null)?.energyFrom === 'sheet' ? points : points.slice(0, 1);
}

function bakeOf({ bake }: Sheet, heatUp: number): FlashAnswer['bake'] {
  if (!bake || bake.minutes === 0) return null;
  const onTheClock = bakeMinutesOnTheClock({
    minutes: bake.minutes,
    reference: bake.measuredAt,
    heatUpMinutes: heatUp,
  });
  return { ...bake, heatUp, onTheClock };
}
