import { Plus, X } from 'lucide-react';
import { takePeople, type PeopleStep as Taken } from '#contracts/first-steps.ts';
import { paths } from '#src/app/paths.ts';
import { parseLooseTime } from '#src/lib/loose-time.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { useTypedForm, type FormRead } from '../parts/use-typed-form.ts';
import { useTakeStep } from './first-steps-query.ts';
import { clockText, sayFault } from './numbers.ts';
import { StepForm } from './step-form.tsx';

type Row = { name: string; skills: string; trained: string; isMe: boolean };
type Form = { rows: Row[]; from: string; to: string; onlyWarn: boolean };

/** The skills are those that the starter set of process sheets asks for. */
const usual: Form = {
  rows: [
    { name: 'Painter 1', skills: 'paint, prep', trained: '', isMe: false },
    { name: 'Prepper 1', skills: 'prep, polish', trained: '', isMe: false },
  ],
  from: '7:00',
  to: '15:30',
  onlyWarn: false,
};

const sprays = ({ skills }: Row): boolean => /(^|[,;\s])paint($|[,;\s])/i.test(skills);
const isUntrained = (row: Row): boolean => sprays(row) && row.trained === '';

function read(form: Form): FormRead<Form, Taken> {
  const parsed = takePeople.body.safeParse({
    people: form.rows.map(({ name, skills, trained, isMe }) => ({
      name,
      skills: skills.split(/[,;]/).flatMap((word) => (word.trim() === '' ? [] : word)),
      sprayTrainedOn: trained === '' ? null : trained,
      isMe,
    })),
    from: clockText(parseLooseTime(form.from), form.from),
    to: clockText(parseLooseTime(form.to), form.to),
    onlyWarn: form.onlyWarn,
  });
  if (!parsed.success) {
    const faults: Partial<Record<keyof Form, string>> = {};
    for (const { path, message } of parsed.error.issues) {
      const key = path[0] === 'people' ? 'rows' : (path[0] as 'from' | 'to');
      faults[key] ??= key === 'rows' ? 'Each line needs a name; skills are words divided by commas.' : message;
    }
    return { value: null, faults };
  }
  if (!form.onlyWarn && form.rows.some(isUntrained))
    return {
      value: null,
      faults: { onlyWarn: 'Enter when each painter was last trained, or let the shop only warn until you do.' },
    };
  return { value: parsed.data, faults: null };
}

export function PeopleStep({ onTaken }: { onTaken: () => void }) {
  const shop = useShop();
  const { form, change, faults, submit, drop } = useTypedForm<Form, Taken>(
    `first-steps.people.${shop.id}`,
    usual,
    read,
  );
  const take = useTakeStep(takePeople, () => {
    drop();
    onTaken();
  });
  const put = (at: number, more: Partial<Row>) =>
    change({
      rows: form.rows.map((row, i) => (i === at ? { ...row, ...more } : more.isMe ? { ...row, isMe: false } : row)),
    });
  const add = () =>
    change({
      rows: [...form.rows, { name: `Person ${form.rows.length + 1}`, skills: 'prep', trained: '', isMe: false }],
    });
  return (
    <StepForm
      busy={take.isPending}
      error={take.error}
      editors={[{ to: paths.people(), label: 'All about people' }]}
      onSend={() => submit((value) => take.mutate(value))}
    >
      <ul className="flex flex-col gap-3">
        {form.rows.map((row, at) => (
          <PersonRow
            key={at}
            row={row}
            number={at + 1}
            onChange={(more) => put(at, more)}
            onRemove={form.rows.length > 1 ? () => change({ rows: form.rows.filter((_, i) => i !== at) }) : null}
          />
        ))}
      </ul>
      {faults.rows !== undefined && <p className="text-xs font-semibold text-crimson">{faults.rows}</p>}
      <Button size="small" className="self-start" icon={<Plus size={14} aria-hidden="true" />} onClick={add}>
        One more
      </Button>
      <div className="grid max-w-sm grid-cols-2 gap-3">
        <TextField
          label="They work from"
          autoComplete="off"
          value={form.from}
          error={sayFault(faults.from)}
          onChange={(event) => change({ from: event.target.value })}
        />
        <TextField
          label="to"
          hint="Monday to Friday."
          autoComplete="off"
          value={form.to}
          error={sayFault(faults.to)}
          onChange={(event) => change({ to: event.target.value })}
        />
      </div>
      <Checkbox
        label="Training dates come later: only warn until then"
        hint="Otherwise nobody without a training of the last five years is given spray work (40 CFR 63.11173; your local rules come first)."
        checked={form.onlyWarn}
        onChange={(event) => change({ onlyWarn: event.target.checked })}
      />
      {faults.onlyWarn !== undefined && (
        <p role="alert" className="text-xs font-semibold text-crimson">
          {faults.onlyWarn}
        </p>
      )}
    </StepForm>
  );
}

type PersonRowProps = {
  row: Row;
  number: number;
  onChange: (more: Partial<Row>) => void;
  onRemove: (() => void) | null;
};

function PersonRow({ row, number, onChange, onRemove }: PersonRowProps) {
  return (
    <li className="flex flex-col gap-2 rounded border border-line p-3">
      <div className="grid items-start gap-2 sm:grid-cols-[1fr_1fr_11rem_auto]">
        <TextField
          label={`Name ${number}`}
          autoComplete="off"
          value={row.name}
          onChange={(event) => onChange({ name: event.target.value })}
        />
        <TextField
          label={`Skills ${number}`}
          autoComplete="off"
          value={row.skills}
          onChange={(event) => onChange({ skills: event.target.value })}
        />
        <TextField
          label={`Spray training ${number}`}
          optional={!sprays(row)}
          type="date"
          value={row.trained}
          onChange={(event) => onChange({ trained: event.target.value })}
        />
        {onRemove && (
          <IconButton
            className="sm:mt-6"
            label={`Leave out line ${number}`}
            icon={<X size={16} aria-hidden="true" />}
            onClick={onRemove}
          />
        )}
      </div>
      <Checkbox label="This is me" checked={row.isMe} onChange={(event) => onChange({ isMe: event.target.checked })} />
    </li>
  );
}
