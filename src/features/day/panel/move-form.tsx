import { useState, type FormEvent } from 'react';
import type { Bar, DayView } from '#contracts/day.ts';
import { Button } from '#src/ui/button.tsx';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import type { Formats } from '#src/lib/formats.ts';
import { entryOf, isFault, moveOf, type EntryFault, type MoveEntry } from '../model/move-form.ts';
import type { Move } from '../model/move-in-view.ts';

type Props = {
  bar: Bar;
  view: DayView;
  formats: Formats;
  pending: boolean;
  onMove: (move: Move) => Promise<boolean>;
};

/** All that dragging does, without dragging: place, start, person, pin. */
export function MoveForm({ bar, view, formats, pending, onMove }: Props) {
  const { entry, set, fault, setFault } = useEntry(bar, formats);
  const submit = async (event: FormEvent) => {
    event.preventDefault();
    const move = moveOf(entry, bar, formats.zone);
    if (isFault(move)) return setFault(move);
    const place = view.rows.find((row) => row.id === move.placeId)?.name ?? '';
    if (await onMove(move))
      showToast(`${bar.jobNumber} stands at ${formats.dateTime(move.start)} in ${place}.`, { tone: 'good' });
  };
  const errorOf = (field: EntryFault['field']) => (fault?.field === field ? fault.message : undefined);
  return (
    <form onSubmit={submit} className="flex flex-col gap-3" aria-label="Move this stage" noValidate>
      <Select label="Place" value={entry.placeId} onChange={(event) => set({ placeId: event.target.value })}>
        {places(view).map((row) => (
          <option key={row.id} value={row.id}>
            {row.name}
          </option>
        ))}
      </Select>
      <div className="grid grid-cols-2 gap-3">
        <TextField
          label="Day"
          type="date"
          value={entry.day}
          error={errorOf('day')}
          onChange={(event) => set({ day: event.target.value })}
        />
        <TextField
          label="Start"
          value={entry.time}
          error={errorOf('time')}
          inputMode="text"
          autoComplete="off"
          onChange={(event) => set({ time: event.target.value })}
        />
      </div>
      {bar.needsHands && (
        <Select label="Person" value={entry.personId} onChange={(event) => set({ personId: event.target.value })}>
          <option value="">{bar.personName ? `${bar.personName}, or whoever is free` : 'Whoever is free'}</option>
          {view.rows.map((row) =>
            row.kind === 'person' ? (
              <option key={row.id} value={row.id}>
                {row.name}
              </option>
            ) : null,
          )}
        </Select>
      )}
      <Checkbox
        label="Pinned"
        hint="The planner leaves it where it is."
        checked={entry.pinned}
        onChange={(event) => set({ pinned: event.target.checked })}
      />
      <Button type="submit" look="primary" busy={pending} className="self-start">
        Move
      </Button>
    </form>
  );
}

/** What is typed for a stage; once it stands elsewhere, that. The fields stay, and with them the focus. */
function useEntry(bar: Bar, formats: Formats) {
  const stands = `${bar.from} ${bar.placeId} ${String(bar.pinned)}`;
  const fresh = (): Typed => ({ of: stands, entry: entryOf(bar, formats.zone, formats.time), fault: null });
  const [typed, setTyped] = useState(fresh);
  if (typed.of !== stands) setTyped(fresh());
  const { entry, fault } = typed;
  return {
    ...{ entry, fault },
    set: (part: Partial<MoveEntry>) => setTyped({ of: stands, entry: { ...entry, ...part }, fault: null }),
    setFault: (found: EntryFault) => setTyped({ ...typed, fault: found }),
  };
}

type Typed = { of: string; entry: MoveEntry; fault: EntryFault | null };

const places = (view: DayView) =>
  view.rows.filter(({ kind }) => kind === 'booth' || kind === 'prep' || kind === 'rack');
