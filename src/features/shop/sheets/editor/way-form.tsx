import { Trash2 } from 'lucide-react';
import type { SheetStage, Way } from '#contracts/sheets.ts';
import { heats, minutesOf, needsHands } from '#server/sheets/way-times.ts';
import { placeKindWords, type PlaceKind } from '#src/lib/place-kind-words.ts';
import { useFormats } from '#src/lib/session.ts';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { removeWay, setWay } from '../model/body-edits.ts';
import type { Below } from '../model/way-templates.ts';
import { ConditionSelect } from './condition-select.tsx';
import { useEditor } from './editor-context.ts';
import { FaultPlace } from './fault-place.tsx';
import { DegreesField } from './figure-field.tsx';
import { GapFields } from './gap-fields.tsx';
import { HeatNote } from './heat-note.tsx';
import { PhasesTable } from './phases-table.tsx';

type WayFormProps = { stage: SheetStage; way: Way; below: Below };

/** One way to do a stage: its phases, its window, and who and where. */
export function WayForm({ stage, way, below }: WayFormProps) {
  const { edit, undo, readOnly, body } = useEditor();
  const { duration } = useFormats();
  const set = (part: Partial<Way>, field: string) =>
    edit(setWay(stage.key, way.id, part), `${stage.key}.${way.id}.${field}`);
  const remove = () => {
    edit(removeWay(stage.key, way.id));
    showToast(`${way.label} is taken out.`, { act: { label: 'Bring it back', run: undo } });
  };
  const first = body.stages[0] === stage;
  return (
    <section aria-label={`Way: ${way.label}`} className="card flex min-w-0 flex-col gap-4 p-4">
      <div className="flex items-end gap-3">
        <FaultPlace stage={stage.key} way={way.id} field="label" also={['ways']} className="grow">
          <TextField
            label="Way"
            value={way.label}
            maxLength={60}
            autoComplete="off"
            onChange={({ target }) => set({ label: target.value }, 'label')}
          />
        </FaultPlace>
        <p className="figures pb-2 text-muted">{duration(minutesOf(way.phases))}</p>
        {!readOnly && (
          <IconButton
            label={`Take out the way ${way.label}`}
            icon={<Trash2 size={16} aria-hidden="true" />}
            onClick={remove}
          />
        )}
      </div>
      <FaultPlace stage={stage.key} way={way.id} field="phases">
        <PhasesTable stage={stage} way={way} below={below} />
      </FaultPlace>
      {heats(way) && (
        <FaultPlace stage={stage.key} way={way.id} field="heat">
          <div className="flex flex-wrap items-end gap-x-4 gap-y-1">
            <DegreesField
              label="Temperature"
              className="w-40"
              nullable
              value={way.bakeCelsius}
              onChange={(bakeCelsius) => set({ bakeCelsius }, 'heat')}
            />
            <HeatNote way={way} />
          </div>
        </FaultPlace>
      )}
      {!first && (
        <FaultPlace stage={stage.key} way={way.id} field="gap">
          <GapFields gap={way.gap} below={below} onChange={(gap, field) => set({ gap }, field)} />
        </FaultPlace>
      )}
      <WhoAndWhere stage={stage} way={way} set={set} />
    </section>
  );
}

const kinds: readonly PlaceKind[] = ['booth', 'prep', 'rack'];

function WhoAndWhere({
  stage,
  way,
  set,
}: Omit<WayFormProps, 'below'> & { set: (part: Partial<Way>, field: string) => void }) {
  return (
    <fieldset className="grid min-w-0 gap-x-4 gap-y-3 sm:grid-cols-2">
      <legend className="mb-2 font-bold">Who and where</legend>
      <FaultPlace stage={stage.key} way={way.id} field="places">
        <Checkbox
          label="Where the stage before leaves it"
          hint="Nobody moves the part in between."
          checked={way.stay}
          onChange={({ target }) => set({ stay: target.checked, placeKinds: target.checked ? [] : ['prep'] }, 'stay')}
        />
        {!way.stay && (
          <div role="group" aria-label="Kinds of place" className="flex flex-wrap gap-x-5">
            {kinds.map((kind) => (
              <Checkbox
                key={kind}
                label={placeKindWords[kind].charAt(0).toUpperCase() + placeKindWords[kind].slice(1)}
                checked={way.placeKinds.includes(kind)}
                onChange={({ target }) =>
                  set(
                    {
                      placeKinds: kinds.filter((one) => (one === kind ? target.checked : way.placeKinds.includes(one))),
                    },
                    'places',
                  )
                }
              />
            ))}
          </div>
        )}
      </FaultPlace>
      <div className="grid grid-cols-2 items-start gap-3">
        <FaultPlace stage={stage.key} way={way.id} field="skill">
          <TextField
            label="Skill"
            optional={!needsHands(way)}
            list="skills"
            autoComplete="off"
            value={way.skill ?? ''}
            onChange={({ target }) => set({ skill: target.value.trim() === '' ? null : target.value }, 'skill')}
          />
        </FaultPlace>
        <FaultPlace stage={stage.key} way={way.id} field="lamps">
          <Select
            label="Lamps"
            value={String(way.lampCount)}
            onChange={({ target }) => set({ lampCount: Number(target.value) }, 'lamps')}
          >
            {Array.from({ length: 9 }, (_, n) => (
              <option key={n} value={n}>
                {n === 0 ? 'None' : n}
              </option>
            ))}
          </Select>
        </FaultPlace>
      </div>
      <More stage={stage} way={way} set={set} />
    </fieldset>
  );
}

/** What most ways leave as it is. */
function More({ stage, way, set }: Omit<WayFormProps, 'below'> & { set: (part: Partial<Way>, field: string) => void }) {
  const { body } = useEditor();
  const condition = way.option ?? way.unlessOption;
  const said = [
    way.split ? 'hand work may pause' : '',
    way.load === null ? '' : `shares runs as ${way.load}`,
    way.family === null ? '' : `clean-up as ${way.family}`,
    condition === undefined
      ? ''
      : `${way.option === undefined ? 'without' : 'with'} “${body.options.find(({ key }) => key === condition)?.label ?? condition}”`,
  ].filter(Boolean);
  return (
    <details className="min-w-0 sm:col-span-2">
      <summary className="min-h-control-small">
        <span className="font-semibold">More</span>
        <span className="text-muted"> {said.join(', ') || 'pauses, shared booth runs, clean-up, option'}</span>
      </summary>
      <div className="mt-2 grid gap-x-4 gap-y-3 sm:grid-cols-2">
        <Checkbox
          label="Hand work may pause"
          hint="With the shift of whoever does it; it goes on when they are back."
          checked={way.split}
          onChange={({ target }) => set({ split: target.checked }, 'split')}
        />
        <FaultPlace stage={stage.key} way={way.id} field="option">
          <ConditionSelect
            label="The way is there"
            value={way}
            onChange={({ option, unlessOption }) => set({ option: option ?? undefined, unlessOption }, 'option')}
          />
        </FaultPlace>
        <TextField
          label="Shares a booth run with"
          optional
          hint="Stages with the same word may run together."
          autoComplete="off"
          list="loads"
          value={way.load ?? ''}
          onChange={({ target }) => set({ load: target.value === '' ? null : target.value }, 'load')}
        />
        <TextField
          label="Clean-up family"
          optional
          hint="Between two families a booth is cleaned."
          autoComplete="off"
          list="families"
          value={way.family ?? ''}
          onChange={({ target }) => set({ family: target.value === '' ? null : target.value }, 'family')}
        />
        {body.options.length === 0 && (
          <p className="text-xs text-muted sm:col-span-2">
            With options on the sheet, a way can belong to one of them.
          </p>
        )}
      </div>
    </details>
  );
}
