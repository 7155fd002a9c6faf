import { useId, useState } from 'react';
import { changeAirSettings, type AirSettings, type AirView } from '#contracts/air.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { ChangedMeanwhile } from '../parts/changed-meanwhile.tsx';
import { useTypedForm } from '../parts/use-typed-form.ts';
import { useAirWrite } from './air-queries.ts';
import { readSettingsForm, settingsForm, type SettingsForm } from './model/air-forms.ts';

type Read = Omit<AirSettings, 'version'>;

/** The shop's usual air, when a plan is out of date with the air, and what the gate asks. */
export function SettingsDialog({ settings, onClose }: { settings: AirSettings; onClose: () => void }) {
  const shop = useShop();
  const { unit } = useFormats();
  const formId = useId();
  const [version, setVersion] = useState(settings.version);
  const typed = useTypedForm<SettingsForm, Read>(
    `air-settings.${shop.id}`,
    settingsForm(settings, unit),
    readSettingsForm(unit),
  );
  const leave = () => {
    typed.drop();
    onClose();
  };
  const write = useAirWrite(changeAirSettings, () => {
    showToast('The shop’s air is saved', { tone: 'good' });
    leave();
  });
  const send = (read: Read) =>
    write.mutate(
      { params: { shopId: shop.id }, body: { ...read, version } },
      {
        onError: (error) => {
          if (isApiError(error, 'stale')) setVersion((error.current as AirView).settings.version);
        },
      },
    );
  const isStale = isApiError(write.error, 'stale');
  const field = (name: keyof SettingsForm, label: string, hint?: string) => (
    <TextField
      label={label}
      {...(hint === undefined ? {} : { hint })}
      inputMode="decimal"
      autoComplete="off"
      error={typed.faults[name]}
      value={typed.form[name]}
      onChange={(event) => typed.change({ [name]: event.target.value })}
    />
  );
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && leave()}
      title="The shop’s air"
      about="What is planned with where nothing else is known, and what the gate asks."
      actions={
        <>
          <Button onClick={leave}>Leave it</Button>
          <Button type="submit" form={formId} look="primary" busy={write.isPending}>
            Save
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
        <div className="grid grid-cols-2 items-start gap-3">
          {field('celsius', `Usual air, °${unit}`)}
          {field('humidity', 'Usual humidity, %')}
          {field('staleCelsius', `Plan out of date by, °${unit}`, 'A change above this is shown on the booth day.')}
          {field('staleHumidity', 'or humidity by, %')}
          {field('fresh', 'A reading counts for, min', 'For the gate before spraying.')}
          {field(
            'margin',
            `Surface over dew point, °${unit}`,
            `At least ${unit === 'C' ? '3' : '5.4'} (ISO 8502-4 practice).`,
          )}
        </div>
        {isStale && <ChangedMeanwhile />}
        {write.error && !isStale && <ErrorNote error={write.error} what="It stays as it was." />}
      </form>
    </Dialog>
  );
}
