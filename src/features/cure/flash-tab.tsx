import type { ReducerSpeed } from '#chemistry/air/reducer-speed.ts';
import { useFormats } from '#src/lib/session.ts';
import { NumberField, TemperatureField, FieldGrid } from './desk-fields.tsx';
import { FlashBars } from './drawings/flash-bars.tsx';
import { degrees, findingWords } from './model/finding-words.ts';
import { flashAnswer, type FlashAnswer } from './model/flash.ts';
import { flashCelsius, type Sheet } from './model/sheet-of.ts';
import { Card, Facts, NotYet, Source, Split, Warnings } from './sections.tsx';
import { SheetPicker } from './sheet-picker.tsx';
import { useSheet } from './use-sheet.ts';
import { useDesk } from './use-desk.ts';

const reducers: Record<ReducerSpeed, string> = {
  fast: 'fast',
  standard: 'standard',
  slow: 'slow',
  'very-slow': 'very slow',
};
const standings: Record<FlashAnswer['standing'], string> = {
  best: 'good to spray in',
  'outside-best': 'outside of the best range',
  never: 'too cold to spray',
};

export function FlashTab() {
  const { values } = useDesk();
  const { unit } = useFormats();
  const sheet = useSheet();
  const answer = sheet?.ok ? flashAnswer(values, sheet.value, unit) : null;
  const errors = (sheet?.ok ? answer : flashAnswer(values, nothing, unit))?.errors ?? {};
  return (
    <Split
      asked={
        <>
          <SheetPicker flash />
          <Card title="Air now">
            <FieldGrid>
              <TemperatureField name="air" label="Air" errors={errors} />
              <NumberField name="rh" label="Humidity, %" errors={errors} />
              <NumberField
                name="damp"
                label="Damp-air factor"
                hint="Your own, 1 or more; 1 leaves the times."
                errors={errors}
              />
              <NumberField
                name="heatup"
                label="Metal heat-up, min"
                hint="As measured in your booth; 10 is only a guess."
                errors={errors}
              />
            </FieldGrid>
          </Card>
        </>
      }
      found={
        <Card title="Least times in this air">
          {sheet?.ok && answer?.ok ? <Found answer={answer.value} sheet={sheet.value} /> : <NotYet />}
        </Card>
      }
    />
  );
}

const nothing: Sheet = {
  name: '',
  coats: { from: 1, to: 1 },
  flashBetweenCoats: 0,
  flashBeforeNext: 0,
  flashBeforeHeat: 0,
  airDry: null,
  bake: null,
  lampShort: null,
  lampMedium: null,
  kilojoulesPerMole: null,
  cautions: [],
};

const shorterWords = ({ rows }: FlashAnswer): string[] =>
  rows.some(({ printed, today }) => today < printed)
    ? ['Shorter than the sheet prints: only where its maker allows it and the film looks ready.']
    : [];

function Found({ answer, sheet }: { answer: FlashAnswer; sheet: Sheet }) {
  const { unit } = useFormats();
  const { bake } = answer;
  return (
    <>
      <FlashBars answer={answer} />
      <Warnings words={[...answer.findings.map((finding) => findingWords(finding, unit)), ...shorterWords(answer)]} />
      <Facts
        rows={[
          ['This air', standings[answer.standing]],
          ['Reducer by makers’ grids', reducers[answer.reducer]],
          ...(bake
            ? ([
                ['Bake', `${bake.minutes} min at ${degrees(bake.celsius, unit)}`],
                [
                  'Heat is on for',
                  bake.measuredAt === 'metal'
                    ? `${bake.onTheClock} min, ${bake.heatUp} of them heat-up`
                    : `${bake.onTheClock} min: the sheet counts booth air`,
                ],
              ] as const)
            : []),
        ]}
      />
      <p className="text-[0.8125rem]">
        Flash is to a look, so these minutes are the least; the painter says when the film is ready.
      </p>
      <Source>
        the sheet&rsquo;s own times, taken at {degrees(flashCelsius(sheet), unit)}, scaled by Arrhenius: between its
        printed temperatures along their own slope, else by 50 kJ/mol (from memory). Best air: a waterborne
        maker&rsquo;s sheet. No formula joins flash and humidity.
      </Source>
    </>
  );
}
