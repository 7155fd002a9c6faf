import { useState } from 'react';
import { emptySheet } from '#contracts/coatings.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { useTypedForm } from '../../parts/use-typed-form.ts';
import { formOf, readSheetForm, type SheetFields, type SheetForm } from '../model/sheet-form.ts';

const blank: SheetFields = { name: '', kind: 'clear', sheet: emptySheet };

/**
 * The form of one data sheet. Typed figures that cannot be are told at once, missing ones when it is sent. Half filled it
 * survives a reload, each unit of temperature for itself.
 */
export function useSheetForm(id: string, from: SheetFields) {
  const shop = useShop();
  const { unit } = useFormats();
  const [untouched] = useState(() => formOf(blank, unit));
  const initial = formOf(from, unit);
  const typed = useTypedForm<SheetForm, SheetFields>(`coating.${shop.id}.${id}.${unit}`, initial, (form) =>
    readSheetForm(form, unit),
  );
  const read = readSheetForm(typed.form, unit);
  const early = Object.fromEntries(
    Object.entries(read.faults ?? {}).filter(([field]) => typed.form[field as keyof SheetForm].trim() !== ''),
  );
  const isDirty = Object.keys(initial).some(
    (field) => typed.form[field as keyof SheetForm] !== initial[field as keyof SheetForm],
  );
  return {
    ...typed,
    faults: { ...early, ...typed.faults },
    sheet: read.value?.sheet ?? null,
    untouched,
    isDirty,
    initial,
  };
}
export type SheetFormState = ReturnType<typeof useSheetForm>;
