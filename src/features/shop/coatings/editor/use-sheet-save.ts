import { useState } from 'react';
import { changeCoating, coatingDetail, type CoatingDetail } from '#contracts/coatings.ts';
import { ApiError } from '#src/lib/api-error.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { showToast } from '#src/ui/toast-store.ts';
import { useCoatingWrite, useKeepCoating } from '../data/use-coating-write.ts';
import { differences } from '../model/field-words.ts';
import { sentFaults } from '../model/sent-faults.ts';
import { formOf, type SheetFields } from '../model/sheet-form.ts';
import { useSheetForm } from './use-sheet-form.ts';

/**
 * The form of a kept data sheet and its saving. Somebody else's change is taken in while nothing is typed; otherwise what was
 * typed stays, `meanwhile` says what they made of it, and the next save goes over theirs.
 */
export function useSheetSave(coating: CoatingDetail) {
  const shop = useShop();
  const { unit } = useFormats();
  const keep = useKeepCoating();
  const [base, setBase] = useState(coating);
  const state = useSheetForm(coating.id, base);
  const isNewer = coating.version !== base.version;
  if (isNewer && !state.isDirty) {
    setBase(coating);
    state.reset(formOf(coating, unit));
  }
  const meanwhile = isNewer && state.isDirty ? differences(formOf(base, unit), formOf(coating, unit)) : null;
  const save = useCoatingWrite(changeCoating, (saved) => {
    keep(saved);
    setBase(saved);
    state.reset(formOf(saved, unit));
    showToast(`${saved.name} is saved`, { tone: 'good' });
  });
  const onError = (error: unknown) => {
    if (!(error instanceof ApiError)) return;
    const theirs = error.code === 'stale' ? coatingDetail.safeParse(error.current) : null;
    if (theirs?.success) keep(theirs.data);
    else state.tellFaults(sentFaults(error.fields));
  };
  const send = (fields: SheetFields) => {
    const version = meanwhile === null ? base.version : coating.version;
    save.mutate({ params: { shopId: shop.id, coatingId: coating.id }, body: { version, ...fields } }, { onError });
  };
  return { state, save, send, meanwhile, takeBack: () => state.reset(formOf(base, unit)) };
}
