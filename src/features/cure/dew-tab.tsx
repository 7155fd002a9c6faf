import { LEAST_DEW_POINT_MARGIN_CELSIUS } from '#chemistry/air/spray-gate.ts';
import { useFormats } from '#src/lib/session.ts';
import { Choice } from '#src/ui/choice.tsx';
import { FieldGrid, NumberField, TemperatureField } from './desk-fields.tsx';
import { DewScale } from './drawings/dew-scale.tsx';
import { dewAnswer, marginFigure, type DewAnswer } from './model/dew.ts';
import { degrees, findingWords } from './model/finding-words.ts';
import { unitFromCelsius } from './model/typed.ts';
import { Card, Facts, NotYet, Source, Split, Verdict, Warnings } from './sections.tsx';
import { useDesk } from './use-desk.ts';

export function DewTab() {
  const { values, set } = useDesk();
  const { unit } = useFormats();
  const answer = dewAnswer(values, unit);
  const { errors } = answer;
  return (
    <Split
      asked={
        <Card title="Air and surface">
          <Choice
            label="Humidity by"
            value={values.by === 'wet' ? 'wet' : 'rh'}
            onChange={(by) => set({ by })}
            options={[
              { value: 'rh', label: 'Meter, %' },
              { value: 'wet', label: 'Wet bulb' },
            ]}
          />
          <FieldGrid>
            <TemperatureField name="air" label="Air" errors={errors} />
            {values.by === 'wet' ? (
              <TemperatureField name="wet" label="Wet bulb" errors={errors} />
            ) : (
              <NumberField name="rh" label="Humidity, %" errors={errors} />
            )}
            <TemperatureField
              name="surf"
              label="Surface"
              hint="The coldest spot of what is sprayed, measured on it."
              errors={errors}
            />
          </FieldGrid>
        </Card>
      }
      found={<Card title="May it be sprayed?">{answer.ok ? <Found answer={answer.value} /> : <NotYet />}</Card>}
    />
  );
}

function Found({ answer }: { answer: DewAnswer }) {
  const { unit } = useFormats();
  const { gate } = answer;
  const least = `${(unit === 'C' ? LEAST_DEW_POINT_MARGIN_CELSIUS : LEAST_DEW_POINT_MARGIN_CELSIUS * 1.8).toFixed(1)} °${unit}`;
  const margin = `${marginFigure(gate.marginCelsius, unit).toFixed(1)} °${unit}`;
  const coldest = Math.ceil(unitFromCelsius(gate.leastSurfaceCelsius, unit) * 10 - 1e-6) / 10;
  return (
    <>
      <Verdict good={gate.open}>
        {gate.open
          ? `Go: ${margin} over the dew point`
          : gate.marginCelsius <= 0
            ? 'No go: the surface is wet'
            : `No go: only ${margin} over the dew point, ${least} needed`}
      </Verdict>
      <DewScale answer={answer} />
      <Facts
        rows={[
          ['Dew point', degrees(gate.dewPointCelsius, unit)],
          ['Margin', margin],
          ['Coldest surface for this air', `${coldest.toFixed(1)} °${unit}`],
          ['Humidity', `${Math.round(answer.humidityPercent)} %`],
        ]}
      />
      <Warnings words={answer.findings.map((finding) => findingWords(finding, unit))} />
      <Source>
        Magnus form of Alduchov &amp; Eskridge 1996, within 0.15 °C of ASHRAE 2017 from 0 to 60 °C; margin of 3.0 °C by
        ISO 8502-4 practice, held in Celsius (5 °F are only 2.78 °C). Heating the air does not move the dew point.
      </Source>
    </>
  );
}
