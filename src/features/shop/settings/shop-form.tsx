import type { ReplyOf } from '#contracts/endpoint.ts';
import { changeShop, type ShopFields, type ShopSettings } from '#contracts/shop-settings.ts';
import { ApiError, isApiError } from '#src/lib/api-error.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { Choice } from '#src/ui/choice.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { ChangedMeanwhile } from '../parts/changed-meanwhile.tsx';
import { useBase, useSetUpWrite } from '../parts/use-set-up-write.ts';
import { faultsOf, useTypedForm } from '../parts/use-typed-form.ts';
import { CleanupsField } from './cleanups-field.tsx';
import { readShopForm, shopForm, type ShopForm } from './model/shop-form.ts';
import { ObjectiveField } from './objective-field.tsx';
import { ZoneField } from '../parts/zone-field.tsx';

const clocks = [
  { value: '24', label: '14:30' },
  { value: '12', label: '2:30 pm' },
] as const;
const units = [
  { value: 'C', label: '°C' },
  { value: 'F', label: '°F' },
] as const;

type Saved = ReplyOf<typeof changeShop>;
type ShopFormProps = { settings: ShopSettings; mayWrite: boolean; onSaved: (saved: Saved) => void };

/** All settings of the shop, saved together. */
export function ShopFormCard({ settings, mayWrite, onSaved }: ShopFormProps) {
  const { typed, send, error, busy } = useShopForm(settings, onSaved);
  const { form, change, faults } = typed;
  const isStale = isApiError(error, 'stale');
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        typed.submit(send);
      }}
    >
      <fieldset disabled={!mayWrite} className="flex min-w-0 flex-col gap-4">
        <Card title="The shop">
          <div className="grid gap-4 md:grid-cols-2">
            <TextField
              label="Name"
              autoComplete="off"
              error={faults.name}
              value={form.name}
              onChange={(event) => change({ name: event.target.value })}
            />
            <ZoneField value={form.timeZone} error={faults.timeZone} onChange={(timeZone) => change({ timeZone })} />
          </div>
          <div className="flex flex-wrap gap-x-8 gap-y-4">
            <Choice
              label="Clock of new accounts"
              options={clocks}
              value={form.clock}
              onChange={(clock) => change({ clock })}
            />
            <Choice
              label="Temperatures of new accounts"
              options={units}
              value={form.temperatureUnit}
              onChange={(temperatureUnit) => change({ temperatureUnit })}
            />
          </div>
          <p className="text-xs text-muted">Everybody may choose otherwise in their own account.</p>
        </Card>
        <Card title="Planning">
          <div className="grid gap-4 md:grid-cols-2">
            <TextField
              label="Left alone before its start, minutes"
              hint="Posted work that begins within this time is not moved by a plan: people are getting ready for it."
              inputMode="numeric"
              autoComplete="off"
              error={faults.freeze}
              value={form.freeze}
              onChange={(event) => change({ freeze: event.target.value })}
            />
            <TextField
              label="To move a lamp, minutes"
              hint="From one part to the next, leads and all."
              inputMode="numeric"
              autoComplete="off"
              error={faults.lampMove}
              value={form.lampMove}
              onChange={(event) => change({ lampMove: event.target.value })}
            />
          </div>
          <Checkbox
            label="Only people with good spray training are given spray stages"
            hint="A refresher at least every five years (40 CFR 63.11173). Without the tick a lapsed training is only shown as a warning."
            checked={form.trainingBlocks}
            onChange={(event) => change({ trainingBlocks: event.target.checked })}
          />
        </Card>
        <Card title="What a plan tries to do">
          <ObjectiveField weights={form.weights} error={faults.weights} onChange={(weights) => change({ weights })} />
        </Card>
        <Card title="Cleaning between kinds of work">
          <CleanupsField
            rows={form.cleanups}
            families={settings.families}
            error={faults.cleanups}
            onChange={(cleanups) => change({ cleanups })}
          />
        </Card>
      </fieldset>
      {isStale && <ChangedMeanwhile />}
      {error !== null && !isStale && <ErrorNote error={error} what="Nothing was saved." />}
      {mayWrite && (
        <div className="sticky bottom-0 flex flex-wrap items-center justify-end gap-3 border-t border-line bg-paper py-3 max-sm:bottom-14">
          {Object.keys(faults).length > 0 && (
            <p role="status" className="text-crimson">
              Something above needs another look.
            </p>
          )}
          <Button onClick={() => typed.reset(shopForm(settings))}>As it was</Button>
          <Button type="submit" look="primary" busy={busy}>
            Save
          </Button>
        </div>
      )}
    </form>
  );
}

const Card = ({ title, children }: { title: string; children: React.ReactNode }) => (
  <section className="card flex flex-col gap-4 p-4 sm:p-5">
    <h2>{title}</h2>
    {children}
  </section>
);

function useShopForm(settings: ShopSettings, onSaved: (saved: Saved) => void) {
  const shop = useShop();
  const base = useBase(settings);
  const typed = useTypedForm<ShopForm, ShopFields>(`shop.${shop.id}`, shopForm(settings), readShopForm);
  const save = useSetUpWrite(changeShop, (saved) => {
    typed.drop();
    onSaved(saved);
  });
  const send = (fields: ShopFields) =>
    save.mutate(
      { params: { shopId: shop.id }, body: { ...fields, version: base.version } },
      {
        onError: (error) => {
          if (base.takeStale(error) === null && error instanceof ApiError)
            typed.tellFaults(faultsOf<ShopForm>(error.fields));
        },
      },
    );
  return { typed, send, error: save.error, busy: save.isPending };
}
