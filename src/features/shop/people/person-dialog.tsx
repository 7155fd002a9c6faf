import { useId, useState } from 'react';
import { changePerson, createPerson, type Clash, type Person } from '#contracts/people.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { useLocalDraft } from '#src/lib/local-draft.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { formOf, isPersonForm, mondayOf, newPerson, readForm, type PersonForm } from './model/person-form.ts';
import { useDeed, type Roster } from './people-query.ts';
import { SkillsField } from './skills-field.tsx';
import { WeekField } from './week-field.tsx';

type PersonDialogProps = {
  /** Null: somebody new. */
  person: Person | null;
  roster: Roster;
  onClose: () => void;
  onClashes: (name: string, clashes: Clash[]) => void;
};

export function PersonDialog({ person, roster, onClose, onClashes }: PersonDialogProps) {
  const { form, change, tried, faults, send, error, busy, leave } = usePersonForm(person, onClose, onClashes);
  const formId = useId();
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && leave()}
      shape="panel"
      title={person ? person.name : 'Somebody new'}
      about={person ? 'Changes count for every plan from now on.' : 'Plans count on them as soon as they are saved.'}
      actions={
        <>
          <Button onClick={leave}>Leave it</Button>
          <Button type="submit" form={formId} look="primary" busy={busy}>
            {person ? 'Save' : 'Add to the roster'}
          </Button>
        </>
      }
    >
      <form
        id={formId}
        noValidate
        className="flex flex-col gap-5"
        onSubmit={(event) => {
          event.preventDefault();
          send();
        }}
      >
        <TextField
          label="Name"
          autoComplete="off"
          error={tried ? faults?.name : undefined}
          value={form.name}
          onChange={(event) => change({ name: event.target.value })}
        />
        <SkillsField
          value={form.skills}
          known={roster.skills}
          error={tried ? faults?.skills : undefined}
          onChange={(skills) => change({ skills })}
        />
        <TextField
          label="Last spray training"
          optional
          type="date"
          hint="Good for five years, to the same date; of 29 February to the 28th (40 CFR 63.11173; your local rules come first)."
          error={tried ? faults?.trained : undefined}
          value={form.trained}
          onChange={(event) => change({ trained: event.target.value })}
        />
        <Select
          label="Account"
          optional
          hint="Whose bench shows this person’s work."
          value={form.memberId}
          onChange={(event) => change({ memberId: event.target.value })}
        >
          <option value="">none</option>
          {roster.members.map((member) => (
            <option key={member.id} value={member.id}>
              {member.name}
              {member.personId !== null && member.personId !== person?.id && ' (works as somebody else)'}
            </option>
          ))}
        </Select>
        <WeekField
          days={form.days}
          shifts={person?.shifts ?? []}
          faults={tried ? (faults ?? {}) : {}}
          onChange={(days) => change({ days })}
        />
        {error !== null && (
          <ErrorNote
            error={error}
            what={person ? `${person.name} was not changed.` : 'Nobody was added.'}
            {...(isApiError(error, 'stale')
              ? { kept: 'Close this to see how it stands; what you typed is dropped then.' }
              : {})}
          />
        )}
      </form>
    </Dialog>
  );
}

function usePersonForm(
  person: Person | null,
  onClose: () => void,
  onClashes: (name: string, clashes: Clash[]) => void,
) {
  const shop = useShop();
  const formats = useFormats();
  const initial = person ? formOf(person) : newPerson();
  const draft = useLocalDraft(`person.${shop.id}.${person?.id ?? 'new'}`, initial, isPersonForm);
  const [form, setForm] = useState<PersonForm>(draft.start);
  const [tried, setTried] = useState(false);
  const { fields, faults } = readForm(form, person, mondayOf(formats.today()));
  const done = ({ person: saved, clashes }: { person: Person; clashes: Clash[] }) => {
    draft.drop();
    showToast(person ? `${saved.name} saved` : `${saved.name} is on the roster`, { tone: 'good' });
    onClose();
    if (clashes.length > 0) onClashes(saved.name, clashes);
  };
  const create = useDeed(createPerson, done);
  const save = useDeed(changePerson, done);
  const change = (more: Partial<PersonForm>) => {
    const next = { ...form, ...more };
    setForm(next);
    draft.keep(next);
  };
  const send = () => {
    setTried(true);
    if (!fields) return;
    if (!person) create.mutate({ params: { shopId: shop.id }, body: fields });
    else
      save.mutate({
        params: { shopId: shop.id, personId: person.id },
        body: { version: person.version, ...fields },
      });
  };
  const leave = () => {
    draft.drop();
    onClose();
  };
  return {
    form,
    change,
    tried,
    faults,
    send,
    leave,
    error: create.error ?? save.error,
    busy: create.isPending || save.isPending,
  };
}
