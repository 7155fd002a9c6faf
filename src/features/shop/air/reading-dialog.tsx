import { useId, useState } from 'react';
import { v7 } from 'uuid';
import { addReading, type ZoneAir } from '#contracts/air.ts';
import { parseLooseTime } from '#src/lib/loose-time.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { instantOf } from '#src/lib/wall-clock.ts';
import { Button } from '#src/ui/button.tsx';
import { DateTimeField } from '#src/ui/date-time-field.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { useTypedForm } from '../parts/use-typed-form.ts';
import { useAirWrite } from './air-queries.ts';
import { readReadingForm, type ReadingForm } from './model/air-forms.ts';

type Figures = { celsius: number; humidity: number; surface: number | null };

/** What somebody has read off a meter, now or a while ago. */
export function ReadingDialog({ zone, onClose }: { zone: ZoneAir; onClose: () => void }) {
  const shop = useShop();
  const { unit } = useFormats();
  const formId = useId();
  // One id for as long as it is open: sent twice it is written once.
  const [id] = useState(() => v7());
  const typed = useTypedForm<ReadingForm, Figures>(
    `air.${shop.id}.${zone.id}`,
    { celsius: '', humidity: '', surface: '', day: '', time: '' },
    readReadingForm(unit),
  );
  const { form, change, faults } = typed;
  const [momentFault, setMomentFault] = useState<string | null>(null);
  const write = useAirWrite(addReading, () => {
    typed.drop();
    showToast(`The reading of ${zone.name} is kept`, { tone: 'good' });
    onClose();
  });
  const send = ({ surface, ...figures }: Figures) => {
    const at = momentOf(form, shop.timeZone);
    if (at === null) return setMomentFault('Enter a day and a time, or leave both empty for now.');
    setMomentFault(null);
    write.mutate({
      params: { shopId: shop.id, zoneId: zone.id },
      body: { id, at, ...figures, surfaceCelsius: surface },
    });
  };
  const leave = () => {
    typed.drop();
    onClose();
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && leave()}
      title={`A reading in ${zone.name}`}
      about="As the meter shows it."
      actions={
        <>
          <Button onClick={leave}>Leave it</Button>
          <Button type="submit" form={formId} look="primary" busy={write.isPending}>
            Keep it
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
        <div className="grid grid-cols-2 gap-3">
          <TextField
            label={`Air, °${unit}`}
            inputMode="decimal"
            autoComplete="off"
            error={faults.celsius}
            value={form.celsius}
            onChange={(event) => change({ celsius: event.target.value })}
          />
          <TextField
            label="Humidity, %"
            inputMode="decimal"
            autoComplete="off"
            error={faults.humidity}
            value={form.humidity}
            onChange={(event) => change({ humidity: event.target.value })}
          />
        </div>
        <TextField
          label={`Surface of the part, °${unit}`}
          optional
          inputMode="decimal"
          autoComplete="off"
          hint="Of what is to be sprayed. Without it the part is taken to be as warm as the air."
          error={faults.surface}
          value={form.surface}
          onChange={(event) => change({ surface: event.target.value })}
        />
        <DateTimeField
          label="When"
          optional
          hint="Empty: now."
          error={momentFault ?? undefined}
          value={{ day: form.day, time: form.time }}
          onChange={(value) => change(value)}
        />
        {write.error && <ErrorNote error={write.error} what="The reading was not kept." />}
      </form>
    </Dialog>
  );
}

/** Now where nothing is typed; null where half of it is. */
function momentOf({ day, time }: ReadingForm, zone: string): string | null {
  if (day === '' && time.trim() === '') return new Date().toISOString();
  const minutes = parseLooseTime(time);
  if (day === '' || minutes === null) return null;
  return new Date(instantOf(day, minutes, zone)).toISOString();
}
