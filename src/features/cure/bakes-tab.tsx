import { useFormats } from '#src/lib/session.ts';
import { BakeRows } from './bake-rows.tsx';
import { FieldGrid, NumberField, TemperatureField } from './desk-fields.tsx';
import { Plot } from './drawings/plot.tsx';
import { bakeSum, equivalentAnswer, equivalentCurve, type Equivalent } from './model/bakes.ts';
import { contradictionWords, energyWords } from './model/energy-words.ts';
import { degrees, findingWords } from './model/finding-words.ts';
import { spanOf } from './model/plot-geometry.ts';
import { cureOf } from './model/sheet-of.ts';
import { plainNumber, unitFromCelsius } from './model/typed.ts';
import { Card, Headline, NotYet, Source, Split, Warnings } from './sections.tsx';
import { SheetPicker } from './sheet-picker.tsx';
import { useSheet } from './use-sheet.ts';
import { SecondBakes } from './second-bakes.tsx';
import { useDesk } from './use-desk.ts';

export function BakesTab() {
  const { values } = useDesk();
  const { unit } = useFormats();
  const sheet = useSheet();
  const equal = sheet?.ok ? equivalentAnswer(values, sheet.value, unit) : null;
  const sum = sheet?.ok ? bakeSum(values, sheet.value, unit) : null;
  const errors = { ...equal?.errors, ...sum?.errors };
  const contradiction =
    sheet?.ok === true && values.ea.trim() === '' && cureOf(sheet.value, null)?.contradiction === true;
  return (
    <Split
      asked={
        <>
          <SheetPicker />
          <Card title="Same cure, other temperature">
            <FieldGrid>
              <NumberField name="min" label="Bake, min" errors={errors} />
              <TemperatureField name="from" label="at metal" errors={errors} />
              <TemperatureField name="to" label="How long at" errors={errors} />
              <NumberField
                name="ea"
                label="Energy, kJ/mol"
                optional
                hint="Empty: from the sheet, else 50."
                errors={errors}
              />
            </FieldGrid>
          </Card>
          <Card title="Bakes so far">
            <BakeRows errors={errors} />
            <TemperatureField name="rest" label="Bake the rest at metal" errors={errors} />
          </Card>
        </>
      }
      found={
        <>
          <Card title="Bake equivalent">
            {equal?.ok ? <Same answer={equal.value} contradiction={contradiction} /> : <NotYet />}
          </Card>
          <Card title="Second bakes added up">
            {sheet?.ok && sum === null ? (
              <NotYet>This sheet prints neither a bake nor an air-dry time, so there is nothing to add up to.</NotYet>
            ) : sum?.ok ? (
              <SecondBakes sum={sum.value} />
            ) : (
              <NotYet />
            )}
          </Card>
        </>
      }
    />
  );
}

function Same({ answer, contradiction }: { answer: Equivalent; contradiction: boolean }) {
  const { unit } = useFormats();
  const minutes = `${plainNumber(answer.equivalentMinutes, 1)} min`;
  const said = `${plainNumber(answer.minutes, 1)} min at ${degrees(answer.fromCelsius, unit)} is ${minutes} at ${degrees(answer.toCelsius, unit)}`;
  const points = equivalentCurve(answer).map(({ celsius, minutes: y }) => ({ x: unitFromCelsius(celsius, unit), y }));
  const at = (celsius: number) => unitFromCelsius(celsius, unit);
  const [first, last] = [points[0], points.at(-1)];
  const words = answer.findings.map((finding) => findingWords(finding, unit));
  return (
    <>
      <Headline figure={minutes}>
        at {degrees(answer.toCelsius, unit)} cures as far as {plainNumber(answer.minutes, 1)} min at{' '}
        {degrees(answer.fromCelsius, unit)}
      </Headline>
      <Plot
        label={said}
        x={{ from: first?.x ?? 0, to: last?.x ?? 1 }}
        y={{ ...spanOf(points.map(({ y }) => y)), from: 0 }}
        xName={`metal, °${unit}`}
        yName="minutes"
        shade={answer.printed && { from: at(answer.printed.coldest), to: at(answer.printed.hottest) }}
        lines={[{ points, tone: 'ember' }]}
        dots={[
          { x: at(answer.fromCelsius), y: answer.minutes, label: `${plainNumber(answer.minutes, 1)} min` },
          ...(answer.toCelsius === answer.fromCelsius
            ? []
            : [{ x: at(answer.toCelsius), y: answer.equivalentMinutes, label: minutes }]),
        ]}
      />
      <Warnings words={contradiction ? [contradictionWords, ...words] : words} />
      <Source>
        Arrhenius, exp(Ea/R (1/T1 − 1/T2)), R by CODATA 2018; Ea {energyWords(answer.energy)}.
        {answer.printed && ' Shaded: between the temperatures the sheet prints.'}
      </Source>
    </>
  );
}
