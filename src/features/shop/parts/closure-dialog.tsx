import { useId, useState } from 'react';
import type { Clash } from '#contracts/clashes.ts';
import { changeClosure, createClosure, type Closure, type ClosureFields, type ClosureKind } from '#contracts/hours.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { useLocalDraft } from '#src/lib/local-draft.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Choice } from '#src/ui/choice.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { ChangedMeanwhile } from './changed-meanwhile.tsx';
import {
  closureForm,
  closureWords,
  isClosureForm,
  nameOfThing,
  newClosure,
  readClosureForm,
  type ClosureForm,
  type Things,
} from './closure-form.ts';
import type { Measure } from './recurrence.ts';
import { RecurrenceEditor } from './recurrence-editor.tsx';
import { sayRecurrence } from './recurrence-words.ts';
import { useBase, useSetUpWrite } from './use-set-up-write.ts';

export type ClosureDialogProps = {
  /** One that is there, or the kind of a new one. */
  closure: Closure | ClosureKind;
  /** Kinds to choose from. */
  kinds: readonly ClosureKind[];
  things: Things;
  /** A new one is of this place at first. */
  placeId?: string | undefined;
  onClose: () => void;
  onSaved: (what: string, clashes: Clash[]) => void;
};

const abouts: Record<ClosureKind, string> = {
  holiday: 'Nobody works. Parts may stand and dry.',
  closure: 'Not used then. Of the whole shop: people are sent home, parts may stand and dry.',
  maintenance: 'Not used then, and no plan counts on it. Of the whole shop: every place and every lamp stands still.',
  breakdown: 'Not used then, and no plan counts on it. Of the whole shop: every place and every lamp stands still.',
};

/** When a place, a lamp or the whole shop is not used: once or again and again. */
export function ClosureDialog(props: ClosureDialogProps) {
  const { closure, kinds, things, onClose } = props;
  const { form, change, faults, submit, drop, base, error, busy, measure } = useClosureForm(props);
  const { clock } = useFormats();
  const formId = useId();
  const isStale = isApiError(error, 'stale');
  const isNew = typeof closure === 'string';
  const leave = () => {
    drop();
    onClose();
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && leave()}
      shape="panel"
      title={isNew ? closureWords[form.kind] : closure.label || closureWords[closure.kind]}
      about={abouts[form.kind]}
      actions={
        <>
          <Button onClick={leave}>Leave it</Button>
          <Button type="submit" form={formId} look="primary" busy={busy}>
            {isNew ? 'Enter it' : 'Save'}
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
          submit();
        }}
      >
        {kinds.length > 1 && (
          <Choice
            label="Kind"
            options={kinds.map((kind) => ({ value: kind, label: closureWords[kind] }))}
            value={form.kind}
            onChange={(kind) => change({ kind })}
          />
        )}
        <TextField
          label="What for"
          optional
          maxLength={120}
          autoComplete="off"
          value={form.label}
          onChange={(event) => change({ label: event.target.value })}
        />
        <Select label="Of" value={form.of} onChange={(event) => change({ of: event.target.value })}>
          <option value="">the whole shop</option>
          <ThingOptions title="Places" what="place" things={things.places} chosen={form.of} />
          <ThingOptions title="Lamps" what="lamp" things={things.lamps} chosen={form.of} />
        </Select>
        <RecurrenceEditor
          value={form.when}
          onChange={(when) => change({ when })}
          measure={measure}
          faults={faults}
          mayBeAllDay
        />
        {isStale && base && (
          <ChangedMeanwhile>
            <p>
              Now it says: {nameOfThing(things, base)}, {sayRecurrence(base, clock)}.
            </p>
          </ChangedMeanwhile>
        )}
        {error !== null && !isStale && <ErrorNote error={error} what="Nothing was saved." />}
      </form>
    </Dialog>
  );
}

type ThingOptionsProps = { title: string; what: string; things: Things['places']; chosen: string };

/** What is retired is offered only where it is chosen already. */
function ThingOptions({ title, what, things, chosen }: ThingOptionsProps) {
  const offered = things.filter(({ id, retired }) => !retired || chosen === `${what} ${id}`);
  if (offered.length === 0) return null;
  return (
    <optgroup label={title}>
      {offered.map(({ id, name }) => (
        <option key={id} value={`${what} ${id}`}>
          {name}
        </option>
      ))}
    </optgroup>
  );
}

function useClosureForm({ closure, placeId, things, onClose, onSaved }: ClosureDialogProps) {
  const shop = useShop();
  const { clock, today, time } = useFormats();
  const existing = typeof closure === 'string' ? null : closure;
  const base = useBase(existing ?? { version: 0 });
  const [initial] = useState(() =>
    typeof closure === 'string'
      ? newClosure(closure, { day: today(), time: time(new Date()) }, placeId === undefined ? '' : `place ${placeId}`)
      : closureForm(closure, clock),
  );
  const draft = useLocalDraft(
    `closure.${shop.id}.${typeof closure === 'string' ? closure : closure.id}`,
    initial,
    isClosureForm,
  );
  const [form, setForm] = useState(draft.start);
  const [isTried, setTried] = useState(false);
  // Upkeep lasts so long; a closure lasts until then.
  const measure: Measure = form.kind === 'maintenance' ? 'length' : 'end';
  const read = readClosureForm(form, measure);
  const done = (saved: Closure, clashes: Clash[]) => {
    draft.drop();
    const what = `${closureWords[saved.kind]} of ${nameOfThing(things, saved)}`;
    showToast(`${what} is saved`, { tone: 'good' });
    onSaved(what, clashes);
    onClose();
  };
  const create = useSetUpWrite(createClosure, (reply) => done(reply.closure, reply.clashes));
  const save = useSetUpWrite(changeClosure, (reply) => done(reply.closure, reply.clashes));
  const send = (fields: ClosureFields) => {
    if (!existing) return create.mutate({ params: { shopId: shop.id }, body: fields });
    save.mutate(
      { params: { shopId: shop.id, closureId: existing.id }, body: { ...fields, version: base.version } },
      { onError: (error) => void base.takeStale(error) },
    );
  };
  return {
    form,
    measure,
    change: (more: Partial<ClosureForm>) => {
      const next = { ...form, ...more };
      setForm(next);
      draft.keep(next);
    },
    faults: (isTried && read.faults?.when) || {},
    submit: () => {
      setTried(true);
      if (read.value) send(read.value);
    },
    drop: draft.drop,
    base: 'id' in base.base ? base.base : null,
    error: existing ? save.error : create.error,
    busy: create.isPending || save.isPending,
  };
}
