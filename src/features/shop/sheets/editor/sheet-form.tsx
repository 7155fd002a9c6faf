import { Plus, Trash2 } from 'lucide-react';
import { useState } from 'react';
import type { Substrate } from '#contracts/common.ts';
import type { SheetOption } from '#contracts/sheets.ts';
import { substrateWords } from '#src/lib/substrate-words.ts';
import { Button } from '#src/ui/button.tsx';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { Menu, MenuItem } from '#src/ui/menu.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextArea, TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { addOption, removeOption, setOption, setParts, type SheetPart } from '../model/body-edits.ts';
import { usesOf } from '../model/option-uses.ts';
import { useEditor } from './editor-context.ts';
import { FaultPlace } from './fault-place.tsx';

/** What belongs to the sheet as a whole: what it is for, the parts a job gets, and what a job can choose. */
export function SheetForm() {
  const { body, edit, name, rename } = useEditor();
  return (
    <section aria-label="Parts and options" className="flex min-w-0 flex-col gap-4">
      <div className="card flex flex-col gap-3 p-4">
        <FaultPlace stage={null} field="name">
          <TextField
            label="Name of the sheet"
            value={name}
            maxLength={120}
            autoComplete="off"
            onChange={({ target }) => rename(target.value)}
          />
        </FaultPlace>
        <FaultPlace stage={null} field="summary">
          <TextArea
            label="What it is for"
            optional
            rows={2}
            maxLength={400}
            value={body.summary}
            onChange={({ target }) => edit((one) => ({ ...one, summary: target.value }), 'summary')}
          />
        </FaultPlace>
      </div>
      <Parts />
      <Options />
    </section>
  );
}

function Parts() {
  const { body, edit, readOnly } = useEditor();
  const { parts } = body;
  const set = (at: number, part: Partial<SheetPart>, field: string) =>
    edit(setParts(parts.map((one, i) => (i === at ? { ...one, ...part } : one))), `part.${at}.${field}`);
  return (
    <fieldset className="card flex min-w-0 flex-col gap-2 p-4">
      <legend className="float-left mb-1 w-full font-bold">Parts a job begins with</legend>
      <FaultPlace stage={null} field="parts" className="clear-both">
        {parts.map((part, i) => (
          <div
            key={i}
            className="grid grid-cols-[minmax(0,1fr)_4rem_auto] items-start gap-2 sm:grid-cols-[minmax(0,1fr)_11rem_4rem_auto]"
          >
            <TextField
              label={`Part ${i + 1}`}
              hideLabel
              placeholder="Part"
              className="max-sm:col-span-3"
              autoComplete="off"
              maxLength={120}
              value={part.name}
              onChange={({ target }) => set(i, { name: target.value }, 'name')}
            />
            <Select
              label={`Material of part ${i + 1}`}
              hideLabel
              value={part.substrate}
              onChange={({ target }) => set(i, { substrate: target.value as Substrate }, 'substrate')}
            >
              {(Object.keys(substrateWords) as Substrate[]).map((value) => (
                <option key={value} value={value}>
                  {substrateWords[value]}
                </option>
              ))}
            </Select>
            <TextField
              label={`Units of room of part ${i + 1}`}
              hideLabel
              inputMode="numeric"
              value={String(part.units)}
              onChange={({ target }) =>
                set(i, { units: Math.min(100, Number(target.value.replace(/\D/g, '') || 0)) }, 'units')
              }
            />
            {!readOnly && (
              <IconButton
                label={`Take out part ${i + 1}`}
                icon={<Trash2 size={16} aria-hidden="true" />}
                onClick={() => edit(setParts(parts.filter((_, n) => n !== i)))}
              />
            )}
          </div>
        ))}
        {!readOnly && (
          <div className="flex flex-wrap items-center gap-x-3 gap-y-1">
            <Button
              size="small"
              icon={<Plus size={14} aria-hidden="true" />}
              disabled={parts.length >= 40}
              onClick={() => edit(setParts([...parts, { name: '', substrate: 'steel', units: 1 }]))}
            >
              Add a part
            </Button>
            <p className="text-xs text-muted">
              The number is the room it takes. Bakes are held against what the material stands.
            </p>
          </div>
        )}
      </FaultPlace>
    </fieldset>
  );
}

/** Choices that jobs often ask for; the name is the shop's to change. */
const usual: { label: string; most?: number }[] = [
  { label: 'Extra coats', most: 2 },
  { label: 'Filler' },
  { label: 'Adhesion promoter' },
  { label: 'Melt the clear out' },
  { label: 'Second bake' },
  { label: 'Open up and bake again' },
  { label: 'Wet on wet' },
];

function Options() {
  const { body, edit, readOnly } = useEditor();
  const [adding, setAdding] = useState('');
  const add = (label: string, most?: number) => {
    edit(addOption(label, most === undefined ? {} : { most }));
    setAdding('');
  };
  const left = usual.filter(({ label }) => !body.options.some((one) => one.label === label));
  const full = body.options.length >= 12;
  return (
    <fieldset className="card flex min-w-0 flex-col gap-3 p-4">
      <legend className="float-left mb-1 w-full font-bold">Options a job can choose</legend>
      <FaultPlace stage={null} field="options" className="clear-both !gap-3">
        {body.options.length === 0 && (
          <p className="text-muted">
            None yet. An option adds stages, leaves them out, picks among ways, or adds coats.
          </p>
        )}
        {body.options.map((option) => (
          <OptionRow key={option.key} option={option} />
        ))}
        {!readOnly && (
          <form
            className="flex flex-wrap items-end gap-2"
            onSubmit={(event) => {
              event.preventDefault();
              if (adding.trim() !== '') add(adding.trim());
            }}
          >
            <TextField
              label="New option"
              className="w-56"
              maxLength={60}
              value={adding}
              autoComplete="off"
              onChange={({ target }) => setAdding(target.value)}
            />
            <Button type="submit" disabled={full || adding.trim() === ''}>
              Add
            </Button>
            {left.length > 0 && !full && (
              <Menu align="start" trigger={<Button look="quiet">Usual ones</Button>}>
                {left.map(({ label, most }) => (
                  <MenuItem key={label} onSelect={() => add(label, most)}>
                    {label}
                  </MenuItem>
                ))}
              </Menu>
            )}
          </form>
        )}
      </FaultPlace>
    </fieldset>
  );
}

function OptionRow({ option }: { option: SheetOption }) {
  const { body, edit, undo, readOnly } = useEditor();
  const { key, label, on, most = 1 } = option;
  const uses = usesOf(body, key);
  const set = (part: Partial<SheetOption>, field: string) => edit(setOption(key, part), `option.${key}.${field}`);
  return (
    <div className="grid grid-cols-[minmax(0,1fr)_auto] items-start gap-x-3 gap-y-1 border-t border-line pt-3 sm:grid-cols-[minmax(0,1fr)_8.5rem_7.5rem_auto]">
      <TextField
        label={`Name of option ${label}`}
        hideLabel
        value={label}
        maxLength={60}
        autoComplete="off"
        onChange={({ target }) => set({ label: target.value }, 'label')}
      />
      <Select
        label={`How often ${label} can be chosen`}
        hideLabel
        className="max-sm:order-3"
        value={String(most)}
        onChange={({ target }) => {
          const { most: _, ...rest } = option;
          const times = Number(target.value);
          edit(({ options, ...one }) => ({
            ...one,
            options: options.map((given) =>
              given.key === key ? (times === 1 ? rest : { ...rest, most: times }) : given,
            ),
          }));
        }}
      >
        {Array.from({ length: 6 }, (_, i) => (
          <option key={i} value={i + 1}>
            {i === 0 ? 'yes or no' : `up to ${i + 1} times`}
          </option>
        ))}
      </Select>
      <Checkbox
        label="Usually on"
        className="self-center max-sm:order-3"
        checked={on}
        onChange={({ target }) => set({ on: target.checked }, 'on')}
      />
      {!readOnly && (
        <IconButton
          label={`Take out option ${label}`}
          icon={<Trash2 size={16} aria-hidden="true" />}
          onClick={() => {
            edit(removeOption(key));
            showToast(`The option ${label} is taken out.`, { act: { label: 'Bring it back', run: undo } });
          }}
        />
      )}
      <p className="col-span-full text-xs text-muted max-sm:order-4">
        {uses.length > 0 ? uses.join('; ') : 'Does nothing yet: choose it at a stage, a way or a coat.'}
      </p>
    </div>
  );
}
