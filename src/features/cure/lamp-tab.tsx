import { useFormats } from '#src/lib/session.ts';
import { FieldGrid, NumberField, SelectField, TemperatureField } from './desk-fields.tsx';
import { LampResult } from './lamp-result.tsx';
import { lampAnswer, materialOf } from './model/lamp.ts';
import { PANEL_MATERIALS } from '#chemistry/infrared/panel-materials.ts';
import { Card, NotYet, Split } from './sections.tsx';
import { SheetPicker } from './sheet-picker.tsx';
import { useSheet } from './use-sheet.ts';
import { useDesk } from './use-desk.ts';

const materialNames = [
  ['steel', 'Steel'],
  ['aluminium', 'Aluminium'],
  ['polypropylene', 'PP or TPO'],
  ['abs', 'ABS'],
  ['composite', 'Glass-fibre composite'],
] as const;

export function LampTab() {
  const { values } = useDesk();
  const { unit } = useFormats();
  const sheet = useSheet();
  const answer = lampAnswer(values, sheet?.ok ? sheet.value : null, unit);
  const { errors } = answer;
  const usual = PANEL_MATERIALS[materialOf(values)].usualMillimetres;
  return (
    <Split
      asked={
        <>
          <Card title="Panel">
            <FieldGrid>
              <SelectField name="material" label="Made of" options={materialNames} />
              <NumberField
                name="mm"
                label="Thickness, mm"
                placeholder={String(usual)}
                hint={`Empty: ${usual}`}
                errors={errors}
              />
              <NumberField name="pwide" label="Area wide, m" errors={errors} />
              <NumberField name="phigh" label="Area high, m" errors={errors} />
              <TemperatureField name="air" label="Air" errors={errors} />
              <TemperatureField name="want" label="Metal wanted at" errors={errors} />
            </FieldGrid>
            <SelectField
              name="battery"
              label="High-voltage battery"
              options={[
                ['none', 'None, or taken out'],
                ['unknown', 'On board, limit unknown'],
                ['recorded', 'On board, limit known'],
              ]}
            />
            {values.battery === 'recorded' && <TemperatureField name="batat" label="Its limit" errors={errors} />}
          </Card>
          <Card title="Lamp">
            <FieldGrid>
              <NumberField name="kw" label="Power, kW" errors={errors} />
              <SelectField
                name="wave"
                label="Wave"
                options={[
                  ['short', 'Short'],
                  ['medium', 'Medium'],
                ]}
              />
              <NumberField name="wide" label="Lit face wide, m" errors={errors} />
              <NumberField name="high" label="Lit face high, m" errors={errors} />
              <NumberField name="dist" label="Distance, m" errors={errors} />
              <NumberField name="burn" label="Burns for, min" errors={errors} />
              <NumberField
                name="half"
                label="Half power first, min"
                hint="3 to 6 for solvent, from memory"
                errors={errors}
              />
            </FieldGrid>
          </Card>
          <SheetPicker />
        </>
      }
      found={
        answer.ok ? (
          <LampResult answer={answer.value} />
        ) : (
          <Card title="Heat-up">
            <NotYet />
          </Card>
        )
      }
    />
  );
}
