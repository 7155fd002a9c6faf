import { useQuery } from '@tanstack/react-query';
import { useFormats, useShop } from '#src/lib/session.ts';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Select } from '#src/ui/select.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { coatingsQuery } from './desk-queries.ts';
import { FieldGrid, NumberField, SelectField, TemperatureField } from './desk-fields.tsx';
import { degrees } from './model/finding-words.ts';
import type { Errors } from './model/reader.ts';
import { chosenCoating, namesAStranger, typedSheet, type Sheet } from './model/sheet-of.ts';
import { Card } from './sections.tsx';
import { useDesk } from './use-desk.ts';
import { useSheet } from './use-sheet.ts';

/** Chooses a coating of the shop, or takes the lines of a data sheet. `flash`: its flash times are asked for as well. */
export function SheetPicker({ flash }: { flash?: boolean }) {
  const { values, set } = useDesk();
  const { data, error, isPending, refetch } = useQuery(coatingsQuery(useShop().id));
  const coatings = data?.coatings ?? [];
  const sheet = useSheet();
  const chosen = chosenCoating(coatings, values.coating);
  return (
    <Card title="Data sheet">
      {error && (
        <ErrorNote
          error={error}
          what="The shop's coatings could not be loaded."
          kept="You can type the lines of a sheet below."
          retry={() => void refetch()}
        />
      )}
      {isPending ? (
        <Skeleton className="h-control w-full rounded" />
      ) : (
        <Select
          label="Coating"
          value={chosen?.id ?? typedSheet}
          onChange={(event) => set({ coating: event.target.value })}
          hint={coatings.length === 0 && !error ? 'The shop keeps no coatings yet.' : undefined}
        >
          {coatings.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
          <option value={typedSheet}>Another: type its sheet</option>
        </Select>
      )}
      {data && namesAStranger(coatings, values.coating) && (
        <p role="status" className="text-xs font-semibold text-amber">
          The link names a coating that this shop does not keep. Choose one.
        </p>
      )}
      {chosen && sheet?.ok && <SheetLines sheet={sheet.value} flash={flash ?? false} />}
      {!chosen && !isPending && <TypedSheet flash={flash ?? false} errors={sheet?.errors ?? {}} />}
    </Card>
  );
}

function SheetLines({ sheet, flash }: { sheet: Sheet; flash: boolean }) {
  const { unit, duration } = useFormats();
  const { airDry, bake, coats } = sheet;
  const lines = [
    flash && `Coats: ${coats.from === coats.to ? coats.from : `${coats.from} to ${coats.to}`}`,
    airDry && `Air dry: ${duration(airDry.minutes)} at ${degrees(airDry.celsius, unit)}`,
    bake
      ? `Bake: ${bake.minutes} min at ${degrees(bake.celsius, unit)}, ${bake.measuredAt === 'metal' ? 'metal' : 'booth air'}`
      : 'No bake on this sheet',
    ...sheet.cautions,
  ].filter((line) => typeof line === 'string');
  return (
    <ul className="flex flex-col gap-0.5 text-xs text-muted">
      {lines.map((line) => (
        <li key={line}>{line}</li>
      ))}
    </ul>
  );
}

function TypedSheet({ flash, errors }: { flash: boolean; errors: Errors }) {
  const { values } = useDesk();
  // A fault in a field that is out of sight could not be put right.
  const flashShown = flash || (['between', 'next', 'heat'] as const).some((name) => errors[name]);
  return (
    <>
      <FieldGrid>
        {flashShown && (
          <>
            <NumberField name="between" label="Between coats, min" errors={errors} />
            <NumberField name="next" label="Before the next, min" errors={errors} />
            <NumberField name="heat" label="Before heat, min" errors={errors} />
          </>
        )}
        <NumberField name="dry" label="Air dry, min" errors={errors} optional />
        <TemperatureField name="dryat" label="Air dry at" errors={errors} />
        <NumberField name="bake" label="Bake, min" errors={errors} optional />
        {values.bake.trim() !== '' && <TemperatureField name="bakeat" label="Bake at" errors={errors} />}
        <SelectField
          name="measured"
          label="Bake is measured in"
          options={[
            ['metal', 'Metal'],
            ['air', 'Booth air'],
          ]}
        />
      </FieldGrid>
      <p className="text-xs text-muted">As its maker prints it. Only in this link: nothing is saved in the shop.</p>
    </>
  );
}
