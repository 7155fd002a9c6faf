import { useId } from 'react';
import type { Place } from '#contracts/places.ts';
import { changeFilter, createFilter, type Filter, type FilterFields } from '#contracts/upkeep.ts';
import { ApiError, isApiError } from '#src/lib/api-error.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { ChangedMeanwhile } from '../parts/changed-meanwhile.tsx';
import { useBase, useSetUpWrite } from '../parts/use-set-up-write.ts';
import { faultsOf, useTypedForm, type Faults } from '../parts/use-typed-form.ts';
import { filterForm, newFilter, readFilterForm, type FilterForm } from './model/filter-form.ts';

type FilterDialogProps = {
  /** Null: a new one. */
  filter: Filter | null;
  places: readonly Place[];
  onClose: () => void;
};

/** What a filter is and what makes it due. */
export function FilterDialog({ filter, places, onClose }: FilterDialogProps) {
  const { typed, send, retire, error, busy } = useFilterForm({ filter, places, onClose });
  const { form, change, faults } = typed;
  const formId = useId();
  const isStale = isApiError(error, 'stale');
  const leave = () => {
    typed.drop();
    onClose();
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && leave()}
      shape="panel"
      title={filter ? filter.name : 'A new filter'}
      about="It is marked when it is due. What the maker says comes first."
      actions={
        <>
          {retire && (
            <Button look="quiet" onClick={retire} busy={busy}>
              Take it out of use
            </Button>
          )}
          <Button onClick={leave}>Leave it</Button>
          <Button type="submit" form={formId} look="primary" busy={busy}>
            {filter ? 'Save' : 'Add it'}
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
        {!filter && (
          <Select
            label="In"
            error={faults.placeId}
            value={form.placeId}
            onChange={(event) => change({ placeId: event.target.value })}
          >
            {places.map(({ id, name }) => (
              <option key={id} value={id}>
                {name}
              </option>
            ))}
          </Select>
        )}
        <TextField
          label="Name"
          autoComplete="off"
          placeholder="Exhaust filter"
          error={faults.name}
          value={form.name}
          onChange={(event) => change({ name: event.target.value })}
        />
        <Limits {...{ form, change, faults }} />
        {isStale && <ChangedMeanwhile />}
        {error !== null && !isStale && (
          <ErrorNote error={error} what={filter ? `${filter.name} stays as it was.` : 'Nothing was added.'} />
        )}
      </form>
    </Dialog>
  );
}

type LimitsProps = {
  form: FilterForm;
  change: (more: Partial<FilterForm>) => void;
  faults: Faults<FilterForm>;
};

function Limits({ form, change, faults }: LimitsProps) {
  return (
    <fieldset className="grid min-w-0 grid-cols-2 gap-3">
      <legend className="mb-2 font-bold">Due, whichever comes first</legend>
      <TextField
        label="After hours sprayed"
        optional
        inputMode="decimal"
        autoComplete="off"
        error={faults.hours}
        value={form.hours}
        onChange={(event) => change({ hours: event.target.value })}
      />
      <TextField
        label="After days"
        optional
        inputMode="numeric"
        autoComplete="off"
        error={faults.days}
        value={form.days}
        onChange={(event) => change({ days: event.target.value })}
      />
      <TextField
        label="At a pressure of, Pa"
        optional
        inputMode="decimal"
        autoComplete="off"
        error={faults.pascals}
        value={form.pascals}
        onChange={(event) => change({ pascals: event.target.value })}
      />
      <TextField
        label="Efficiency, %"
        optional
        inputMode="decimal"
        autoComplete="off"
        error={faults.efficiency}
        value={form.efficiency}
        onChange={(event) => change({ efficiency: event.target.value })}
      />
      <p className="col-span-2 text-xs text-muted">
        Efficiency is kept on record: 98 % or more for spray booths in the US (40 CFR 63.11173). The rest is on the
        filter&rsquo;s sheet; check with your local code and the maker.
      </p>
    </fieldset>
  );
}

function useFilterForm({ filter, places, onClose }: FilterDialogProps) {
  const shop = useShop();
  const base = useBase(filter ?? { version: 0 });
  const initial = filter ? filterForm(filter) : newFilter(places[0]?.id ?? '');
  const typed = useTypedForm<FilterForm, FilterFields>(
    `filter.${shop.id}.${filter?.id ?? 'new'}`,
    initial,
    readFilterForm,
  );
  const done = ({ name }: Filter) => {
    typed.drop();
    showToast(`${name} is saved`, { tone: 'good' });
    onClose();
  };
  const create = useSetUpWrite(createFilter, done);
  const change = useSetUpWrite(changeFilter, done);
  const onError = (error: unknown) => {
    if (base.takeStale(error) === null && error instanceof ApiError)
      typed.tellFaults(faultsOf<FilterForm>(error.fields));
  };
  const params = { shopId: shop.id, filterId: filter?.id ?? '' };
  return {
    typed,
    send: ({ placeId, ...fields }: FilterFields) => {
      if (!filter) create.mutate({ params: { shopId: shop.id }, body: { placeId, ...fields } }, { onError });
      else change.mutate({ params, body: { ...fields, version: base.version } }, { onError });
    },
    retire:
      filter && !filter.retired
        ? () => change.mutate({ params, body: { version: base.version, retired: true } }, { onError })
        : null,
    error: filter ? change.error : create.error,
    busy: create.isPending || change.isPending,
  };
}
