import { useMemo } from 'react';
import { useFormats } from '#src/lib/session.ts';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { contradictionWords, energyWords } from './model/energy-words.ts';
import { Plot } from './drawings/plot.tsx';
import { firstValues } from './model/desk-state.ts';
import { degrees, findingWords, limitDegrees } from './model/finding-words.ts';
import { choiceOf, type Judged } from './model/judge.ts';
import { spanOf } from './model/plot-geometry.ts';
import type { Sheet } from './model/sheet-of.ts';
import type { TraceHead } from './model/trace-engine.ts';
import { plainNumber, unitFromCelsius } from './model/typed.ts';
import { Facts, NotYet, Source, Verdict, Warnings } from './sections.tsx';
import type { TraceDesk } from './trace-desk.ts';
import { AttachTrace } from './attach-trace.tsx';
import { useDesk } from './use-desk.ts';
import { useJudged } from './use-judged.ts';

type TraceResultProps = { fileName: string; head: TraceHead; desk: TraceDesk; sheet: Sheet };

export function TraceResult({ fileName, head, desk, sheet }: TraceResultProps) {
  const { values } = useDesk();
  const { unit } = useFormats();
  const { done, limit, col, clock, unit: byHand } = values;
  // Only what the judgement depends on, so that nothing else on the desk has it judged anew.
  const judging = { ...firstValues, done, limit, col, clock, unit: byHand };
  const { answer, fault } = useJudged(desk, { values: judging, choice: choiceOf(values, head), sheet, unit });
  if (fault !== null) return <NotYet>The record could not be judged: {fault}. Open the file again.</NotYet>;
  if (answer === null) return <SkeletonLines lines={6} label="Judging the record" />;
  if (!answer.ok) return <NotYet />;
  if (answer.value === 'no-cure')
    return (
      <NotYet>{sheet.name} prints neither a bake nor an air-dry time: choose another sheet to judge the bake.</NotYet>
    );
  if (answer.value === 'no-rows') return <NotYet>This column has fewer than two readings. Choose another.</NotYet>;
  return (
    <>
      <Found judged={answer.value} sheet={sheet} />
      <AttachTrace
        judged={answer.value}
        choice={choiceOf(values, head)}
        desk={desk}
        fileName={fileName}
        sheet={sheet}
      />
    </>
  );
}

const minutes = (value: number) => `${plainNumber(value, 1)} min`;

function Found({ judged, sheet }: { judged: Judged; sheet: Sheet }) {
  const { unit, duration } = useFormats();
  const { judgement, cure, trace } = judged;
  const { kinetics } = cure;
  const bake = `${minutes(judgement.neededReferenceMinutes)} at ${degrees(kinetics.referenceCelsius, unit)}`;
  // Done is rounded down and the rest up, so that 29.96 of 30 does not read as cured.
  const done = Math.floor(judgement.doneReferenceMinutes * 10 + 1e-6) / 10;
  const left = Math.ceil(judgement.leftReferenceMinutes * 10 - 1e-6) / 10;
  return (
    <>
      <Verdict good={judgement.cured}>
        {judgement.cured
          ? `Cured by the sheet of ${sheet.name}`
          : `Not yet cured: ${minutes(left)} short at ${degrees(kinetics.referenceCelsius, unit)}`}
      </Verdict>
      {judged.tooHot && judged.hottestCelsius !== null && judged.limitCelsius !== null && (
        <Verdict good={false}>
          {findingWords({ code: 'above-heat-limit', value: judged.hottestCelsius, limit: judged.limitCelsius }, unit)}
        </Verdict>
      )}
      <TracePlot judged={judged} />
      <Warnings
        words={warnings(judged, sheet).concat(judgement.findings.map((finding) => findingWords(finding, unit)))}
      />
      <Facts
        rows={[
          [`Done, as minutes at ${degrees(kinetics.referenceCelsius, unit)}`, minutes(done)],
          ['The sheet asks for', bake],
          [
            'Enough after',
            judged.curedAtMinute === null ? 'not in this bake' : minutes(Math.ceil(judged.curedAtMinute * 10) / 10),
          ],
          ['Hottest reading', judged.hottestCelsius === null ? '' : degrees(judged.hottestCelsius, unit)],
          ['Length', duration(trace.at(-1)?.minutes ?? 0)],
          ['Longest gap between readings', minutes(judgement.longestGapMinutes)],
        ]}
      />
      <Source>
        Arrhenius along the trace, straight lines between readings; Ea{' '}
        {energyWords({ kilojoulesPerMole: kinetics.kilojoulesPerMole, from: cure.energyFrom })}. It judges the record,
        not the film: a solvent or hardness test has the last word.
      </Source>
    </>
  );
}

function warnings({ judgement, cure }: Judged, sheet: Sheet): string[] {
  return [
    ...(cure.contradiction ? [contradictionWords] : []),
    ...(sheet.bake ? [] : ['The sheet prints no bake: the record is held against its air-dry time.']),
    ...(sheet.bake?.measuredAt === 'air'
      ? ['The sheet counts booth air. A record of metal reads a little less cured than the sheet means.']
      : []),
    ...(judgement.longestGapMinutes > 2
      ? ['Readings are far apart: what happened between two of them is only assumed.']
      : []),
  ];
}

function TracePlot({ judged: { trace, curve, judgement, limitCelsius } }: { judged: Judged }) {
  const { unit } = useFormats();
  const needed = judgement.neededReferenceMinutes;
  const points = useMemo(
    () => trace.map(({ minutes: x, metalCelsius }) => ({ x, y: unitFromCelsius(metalCelsius, unit) })),
    [trace, unit],
  );
  const end = points.at(-1)?.x ?? 1;
  const hot = limitCelsius === null ? [] : [unitFromCelsius(limitCelsius, unit)];
  const y = spanOf([...extremes(points), ...hot]);
  const most = Math.max(needed, judgement.doneReferenceMinutes);
  return (
    <>
      <Plot
        height={280}
        label={`Temperature over ${plainNumber(end, 0)} min, and the cure it earned: ${plainNumber(judgement.doneReferenceMinutes, 1)} of ${plainNumber(needed, 1)} min`}
        x={{ from: points[0]?.x ?? 0, to: end }}
        y={y}
        xName="minutes"
        yName={`temperature, °${unit}`}
        right={{ span: { from: 0, to: most * 1.12 }, name: 'cure, min' }}
        lines={[
          { points, tone: 'ember' },
          {
            points: curve.map((point) => ({ x: point.minutes, y: point.done })),
            tone: 'petrol',
            dashed: true,
            axis: 'right',
          },
        ]}
        levels={[
          { y: needed, tone: 'petrol', label: `needed ${plainNumber(needed, 1)} min`, axis: 'right' },
          ...(limitCelsius === null
            ? []
            : [
                {
                  y: unitFromCelsius(limitCelsius, unit),
                  tone: 'crimson' as const,
                  label: `limit ${limitDegrees(limitCelsius, unit)}`,
                },
              ]),
        ]}
      />
      <p aria-hidden="true" className="flex flex-wrap gap-x-5 gap-y-1 text-xs text-muted">
        <span>
          <b className="text-ember">——</b> temperature, left scale
        </span>
        <span>
          <b className="text-petrol">– –</b> cure earned, right scale
        </span>
      </p>
    </>
  );
}

function extremes(points: readonly { y: number }[]): [number, number] {
  let [low, high] = [Infinity, -Infinity];
  for (const { y } of points) {
    low = Math.min(low, y);
    high = Math.max(high, y);
  }
  return [low, high];
}
