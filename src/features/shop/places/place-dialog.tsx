import { useId } from 'react';
import type { Clash } from '#contracts/clashes.ts';
import { changePlace, createPlace, type Place, type PlaceFields, type Zone } from '#contracts/places.ts';
import { ApiError, isApiError } from '#src/lib/api-error.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Caution } from '#src/ui/caution.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { ChangedMeanwhile } from '../parts/changed-meanwhile.tsx';
import { useBase, useSetUpWrite } from '../parts/use-set-up-write.ts';
import { faultsOf, useTypedForm } from '../parts/use-typed-form.ts';
import { formOf, newPlace, readPlaceForm, type PlaceForm } from './model/place-form.ts';
import { PlaceFieldSet } from './place-fields.tsx';
import { PlaceFacts } from './place-facts.tsx';

type PlaceDialogProps = {
  /** Null: a new one. */
  place: Place | null;
  zones: readonly Zone[];
  onClose: () => void;
  onSaved: (name: string, clashes: Clash[]) => void;
};

export function PlaceDialog({ place, zones, onClose, onSaved }: PlaceDialogProps) {
  const { typed, base, send, error, busy, isStale } = usePlaceForm(place, onClose, onSaved);
  const formId = useId();
  const leave = () => {
    typed.drop();
    onClose();
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && leave()}
      shape="panel"
      title={place ? place.name : 'A new place'}
      about="Counts for every plan from now on."
      actions={
        <>
          <Button onClick={leave}>Leave it</Button>
          <Button type="submit" form={formId} look="primary" busy={busy}>
            {place ? 'Save' : 'Add it'}
          </Button>
        </>
      }
    >
      <form
        id={formId}
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => {
          event.preventDefault();
          typed.submit(send);
        }}
      >
        <PlaceFieldSet form={typed.form} change={typed.change} faults={typed.faults} zones={zones} />
        {isStale && base && (
          <ChangedMeanwhile>
            <PlaceFacts place={base} zones={zones} />
          </ChangedMeanwhile>
        )}
        {error !== null && !isStale && (
          <ErrorNote error={error} what={place ? `${place.name} stays as it was.` : 'Nothing was added.'} />
        )}
        <Caution quiet>
          Planning figures. The maker&rsquo;s plate, your fire code and the licensed people responsible come first.
        </Caution>
      </form>
    </Dialog>
  );
}

function usePlaceForm(place: Place | null, onClose: () => void, onSaved: PlaceDialogProps['onSaved']) {
  const shop = useShop();
  const { unit } = useFormats();
  const base = useBase(place ?? { version: 0 });
  const initial = place ? formOf(place, unit) : newPlace();
  const typed = useTypedForm<PlaceForm, PlaceFields>(`place.${shop.id}.${place?.id ?? 'new'}`, initial, (form) =>
    readPlaceForm(form, unit),
  );
  const done = (name: string, clashes: Clash[]) => {
    typed.drop();
    showToast(`${name} is saved`, { tone: 'good' });
    onSaved(name, clashes);
    onClose();
  };
  const create = useSetUpWrite(createPlace, ({ place: { name }, clashes }) => done(name, clashes));
  const change = useSetUpWrite(changePlace, ({ place: { name }, clashes }) => done(name, clashes));
  const onError = (error: unknown) => {
    if (base.takeStale(error) === null && error instanceof ApiError)
      typed.tellFaults(renamed(faultsOf<PlaceFields>(error.fields)));
  };
  const send = (fields: PlaceFields) => {
    const params = { shopId: shop.id };
    if (!place) return create.mutate({ params, body: fields }, { onError });
    change.mutate(
      { params: { ...params, placeId: place.id }, body: { ...fields, version: base.version } },
      { onError },
    );
  };
  const error = place ? change.error : create.error;
  return {
    typed,
    base: 'id' in base.base ? base.base : null,
    send,
    error,
    busy: create.isPending || change.isPending,
    isStale: isApiError(error, 'stale'),
  };
}

/** The form's own names for fields that it holds in other units. */
const renamed = ({ name, zoneId, units }: Partial<Record<keyof PlaceFields, string>>) => ({
  ...(name === undefined ? {} : { name }),
  ...(zoneId === undefined ? {} : { zoneId }),
  ...(units === undefined ? {} : { units }),
});
