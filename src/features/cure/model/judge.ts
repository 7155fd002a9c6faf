import { HAIR } from '#chemistry/constants.ts';
import { judgeBake, type BakeJudgement } from '#chemistry/cure/judge-bake.ts';
import type { TimeUnit } from './csv/layout.ts';
import type { TraceTable } from './csv/read-table.ts';
import type { Values } from './desk-state.ts';
import { ranges, reader, type Answer, type Errors } from './reader.ts';
import { cureOf, type CureOf, type Sheet } from './sheet-of.ts';
import { cureCurve, curedAtMinute, type ChosenTrace, type CurePoint, type TraceChoice } from './trace.ts';
import type { Unit } from './typed.ts';

export const timeUnits: readonly TimeUnit[] = ['ms', 's', 'min', 'h', 'hh:mm', 'mm:ss'];

/** Which column, unit and time scale: by the address where it fits this file, else as the file suggests. */
export function choiceOf(
  values: Values,
  table: { layout: TraceTable['layout']; columns: readonly unknown[] },
): TraceChoice {
  const { kind, unit } = table.layout.time;
  const column = /^\d+$/.test(values.col) ? Number(values.col) : -1;
  const offered = timeUnits.find((time) => time === values.clock && timeFits(kind, time));
  return {
    column: column >= 0 && column < table.columns.length ? column : table.columns.length > 1 ? 'coldest' : 0,
    unit: values.unit === 'C' || values.unit === 'F' ? values.unit : null,
    time: offered ?? unit,
  };
}

/** A date is what it is; a clock is hours or minutes first; a number may be in any unit. */
export const timeFits = (kind: TraceTable['layout']['time']['kind'], time: TimeUnit): boolean =>
  kind === 'date' ? time === 's' : (kind === 'clock') === time.includes(':');

function read(values: Values, unit: Unit) {
  const { number, celsius, answer, errors } = reader(values, unit);
  const earlier = number('done', ranges.minutesOrNone);
  const limit = /^[CF]?$/.test(values.limit.trim()) ? null : celsius('limit', { least: 20, most: 200 });
  return { earlier, limit, answer, errors };
}
export const judgingErrors = (values: Values, unit: Unit): Errors => read(values, unit).errors;

export type Judged = ChosenTrace & {
  cure: CureOf;
  judgement: BakeJudgement;
  curve: CurePoint[];
  curedAtMinute: number | null;
  limitCelsius: number | null;
  tooHot: boolean;
};

/** A trace held against a sheet. `no-cure`: the sheet prints no cure time; `no-rows`: too few readings to judge. */
export function judge(
  values: Values,
  chosen: ChosenTrace,
  sheet: Sheet,
  unit: Unit,
): Answer<Judged | 'no-cure' | 'no-rows'> {
  const { earlier, limit, answer } = read(values, unit);
  return answer(() => {
    const cure = cureOf(sheet, null);
    if (!cure) return 'no-cure';
    const { trace, hottestCelsius } = chosen;
    if (trace.length < 2) return 'no-rows';
    const { kinetics } = cure;
    const judgement = judgeBake(kinetics, { trace, earlierReferenceMinutes: earlier });
    const curve = cureCurve(trace, kinetics, earlier);
    return {
      ...chosen,
      cure,
      judgement,
      curve,
      curedAtMinute: curedAtMinute(curve, kinetics.referenceMinutes),
      limitCelsius: limit,
      // The cure is the coldest sensor's, the limit the hottest one's.
      tooHot: limit !== null && hottestCelsius !== null && hottestCelsius > limit + HAIR,
    };
  });
}
