import { useId, useState } from 'react';
import { retirePerson, type Person } from '#contracts/people.ts';
import { ApiError, isApiError } from '#src/lib/api-error.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Choice } from '#src/ui/choice.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { useDeed } from './people-query.ts';

/** Off the roster now or after a last day. Where posted work stands in the way it is named, and the day after it is offered. */
export function RetireDialog({ person, onClose }: { person: Person; onClose: () => void }) {
  const shop = useShop();
  const { today, dayOf } = useFormats();
  const formId = useId();
  const [when, setWhen] = useState<'now' | 'later'>('now');
  const [lastDay, setLastDay] = useState(today());
  const retire = useDeed(retirePerson, () => {
    showToast(when === 'now' ? `${person.name} is off the roster` : `${person.name} stays until their last day`);
    onClose();
  });
  const { error } = retire;
  const ends = error instanceof ApiError ? error.reasons.flatMap(({ at }) => at[1] ?? []).sort() : [];
  const lastBooked = ends.at(-1);
  const send = () =>
    retire.mutate({
      params: { shopId: shop.id, personId: person.id },
      body: { version: person.version, lastDay: when === 'now' ? null : lastDay },
    });
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Take ${person.name} off the roster`}
      about="What they did stays on record. They can be brought back."
      actions={
        <>
          <Button onClick={onClose}>Keep them</Button>
          <Button type="submit" form={formId} look="primary" busy={retire.isPending}>
            Take off
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
          send();
        }}
      >
        <Choice
          label="When"
          value={when}
          onChange={setWhen}
          options={[
            { value: 'now', label: 'Now' },
            { value: 'later', label: 'After a last day' },
          ]}
        />
        {when === 'later' && (
          <TextField
            label="Last day"
            type="date"
            value={lastDay}
            onChange={(event) => setLastDay(event.target.value)}
          />
        )}
        {retire.isError && (
          <ErrorNote error={error} what={`${person.name} stays on the roster.`}>
            {isApiError(error, 'refused') && lastBooked !== undefined && (
              <Button
                size="small"
                className="self-start"
                onClick={() => {
                  setWhen('later');
                  setLastDay(dayOf(lastBooked));
                  retire.reset();
                }}
              >
                Make the day of the last of these their last day
              </Button>
            )}
          </ErrorNote>
        )}
      </form>
    </Dialog>
  );
}
