import { DEFAULT_HEAT_UP_MINUTES } from '#chemistry/sheets/minutes-from-sheet.ts';
import { coatingKind, type CoatingKind } from '#contracts/coatings.ts';
import { coatingKindWords } from '#src/lib/coating-words.ts';
import { Choice } from '#src/ui/choice.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextArea } from '#src/ui/text-field.tsx';
import { DegreesField, FigureField, Row, Section, WordsField, type FormParts } from './form-fields.tsx';

const measured = [
  { value: 'metal', label: 'Metal' },
  { value: 'air', label: 'Booth air' },
] as const;

export const NameSection = (parts: FormParts) => (
  <Section title="Which coating">
    <Row>
      <WordsField {...parts} name="name" label="Name" hint="As the shop calls it." />
      <Select
        label="Kind"
        value={parts.form.kind}
        onChange={(event) => parts.change({ kind: event.target.value as CoatingKind })}
      >
        {coatingKind.options.map((kind) => (
          <option key={kind} value={kind}>
            {coatingKindWords[kind]}
          </option>
        ))}
      </Select>
      <WordsField {...parts} name="maker" label="Maker and product" optional />
      <WordsField
        {...parts}
        name="edition"
        label="Edition of the maker’s sheet"
        hint="Number or date on it."
        optional
      />
    </Row>
  </Section>
);

export const CoatsSection = (parts: FormParts) => (
  <Section
    title="Coats and flash"
    about="Least times; the look of the film has the last word. Type 10, 1 h 30 or 2 days."
  >
    <Row>
      <FigureField {...parts} name="coatsFrom" label="Coats, at least" />
      <FigureField {...parts} name="coatsTo" label="Coats, at most" />
      <FigureField {...parts} name="between" label="Flash between coats, min" />
      <FigureField {...parts} name="next" label="Flash before the next product, min" />
      <FigureField {...parts} name="heat" label="Flash before heat, min" />
    </Row>
  </Section>
);

export const WindowsSection = (parts: FormParts) => (
  <Section title="Recoat and pot life" about="The recoat window begins with the flash before the next product.">
    <Row>
      <FigureField
        {...parts}
        name="recoat"
        label="Recoat without sanding within"
        hint="Empty: the window has no end."
        optional
      />
      <FigureField {...parts} name="pot" label="Pot life" hint="Empty: nothing is mixed that hardens." optional />
    </Row>
  </Section>
);

export const CureSection = (parts: FormParts) => (
  <Section title="Cure" about="A line left empty: the maker gives none.">
    <Row>
      <FigureField {...parts} name="airMinutes" label="Air dry" optional />
      <DegreesField {...parts} name="airAt" label="Air dry at" optional />
    </Row>
    <Row>
      <FigureField {...parts} name="bakeMinutes" label="Bake, min" optional />
      <DegreesField {...parts} name="bakeAt" label="Bake at" optional />
      <FigureField
        {...parts}
        name="heatUp"
        label="Heat-up of the metal, min"
        hint={`On top of a metal time. Empty: ${DEFAULT_HEAT_UP_MINUTES} min, from memory; measure your own.`}
        optional
      />
    </Row>
    <Choice
      label="The bake’s temperature is that of"
      options={measured}
      value={parts.form.measured}
      onChange={(value) => parts.change({ measured: value })}
    />
    <Row>
      <FigureField {...parts} name="shortMinutes" label="Short-wave lamp, min" optional />
      <FigureField {...parts} name="shortMetres" label="Short wave at a distance of, m" optional />
    </Row>
    <Row>
      <FigureField {...parts} name="mediumMinutes" label="Medium-wave lamp, min" optional />
      <FigureField {...parts} name="mediumMetres" label="Medium wave at a distance of, m" optional />
    </Row>
  </Section>
);

/** `energyNow`: what the cure desk reckons with while the field is empty. */
export const LimitsSection = ({ energyNow, ...parts }: FormParts & { energyNow: string | null }) => (
  <Section title="Limits and air">
    <Row>
      <DegreesField {...parts} name="limit" label="Film never hotter than" optional />
      <DegreesField {...parts} name="holdsFrom" label="Figures hold from" optional />
      <DegreesField {...parts} name="holdsTo" label="Figures hold to" optional />
    </Row>
    <Row>
      <FigureField
        {...parts}
        name="energy"
        label="Activation energy, kJ/mol"
        hint={energyNow === null ? 'Empty: fitted to the two cure times.' : `Empty: ${energyNow}`}
        optional
      />
    </Row>
    <p className="text-[0.8125rem] text-muted">
      Longer flashes in cold and in damp air, by the shop’s own experience: no formula stands behind these two. A factor
      of 1.25 waits a quarter longer.
    </p>
    <Row>
      <DegreesField {...parts} name="coldBelow" label="Colder than" optional />
      <FigureField {...parts} name="coldFactor" label="Cold factor (set by the shop)" optional />
    </Row>
    <Row>
      <FigureField {...parts} name="dampAbove" label="Damper than, % humidity" optional />
      <FigureField {...parts} name="dampFactor" label="Damp factor (set by the shop)" optional />
    </Row>
    <TextArea
      label="Cautions"
      optional
      hint="One a line; shown wherever the sheet’s figures are."
      error={parts.faults.cautions}
      value={parts.form.cautions}
      onChange={(event) => parts.change({ cautions: event.target.value })}
    />
  </Section>
);
