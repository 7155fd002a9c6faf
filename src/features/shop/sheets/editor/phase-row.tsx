import { ArrowDown, ArrowUp, Ellipsis, Flame, Hourglass, Layers, Trash2 } from 'lucide-react';
import type { PhaseKind } from '#contracts/common.ts';
import type { Coating } from '#contracts/coatings.ts';
import type { Phase, SheetStage, Way } from '#contracts/sheets.ts';
import { phaseWords } from '#src/lib/phase-words.ts';
import { IconButton } from '#src/ui/icon-button.tsx';
import { Menu, MenuItem, MenuLine } from '#src/ui/menu.tsx';
import { PhaseSwatch } from '#src/ui/phase-bar.tsx';
import { Select } from '#src/ui/select.tsx';
import { movePhase, removePhase, setPhase } from '../model/body-edits.ts';
import { withoutSource } from '../model/phases.ts';
import { useEditor } from './editor-context.ts';
import { MinutesField } from './figure-field.tsx';
import { SourceSelect } from './source-select.tsx';

type PhaseRowProps = { stage: SheetStage; way: Way; phase: Phase; at: number; coating: Coating | null };

const kinds: readonly PhaseKind[] = ['setup', 'work', 'spray', 'flash', 'purge', 'bake', 'cool'];

/** One phase: what, how long, who is there, where the minutes come from. What few phases have is in its menu. */
export function PhaseRow({ stage, way, phase, at, coating }: PhaseRowProps) {
  const { edit, readOnly } = useEditor();
  const set = (next: Phase, field: string) =>
    edit(setPhase(stage.key, way.id, at, next), `${stage.key}.${way.id}.${at}.${field}`);
  const name = `phase ${at + 1}`;
  return (
    <li
      aria-label={`Phase ${at + 1}: ${phaseWords[phase.kind]}`}
      className="grid grid-cols-[1.5rem_minmax(0,1fr)_minmax(0,1fr)_var(--control-small)] items-center gap-x-2 gap-y-1.5 py-1.5 md:grid-cols-[1.5rem_7.5rem_4.5rem_8.5rem_minmax(0,1fr)_auto]"
    >
      <PhaseSwatch kind={phase.kind} />
      <Select
        label={`Kind of ${name}`}
        hideLabel
        value={phase.kind}
        onChange={({ target }) => set(withoutSource({ ...phase, kind: target.value as PhaseKind }), 'kind')}
      >
        {kinds.map((kind) => (
          <option key={kind} value={kind}>
            {phaseWords[kind]}
          </option>
        ))}
      </Select>
      <MinutesField
        label={`Minutes of ${name}`}
        hideLabel
        value={phase.minutes}
        onChange={(minutes) =>
          set({ ...(phase.source === 'coat' ? phase : withoutSource(phase)), minutes: minutes ?? 0 }, 'minutes')
        }
      />
      {!readOnly && <PhaseMenu stage={stage} way={way} phase={phase} at={at} set={set} />}
      <Select
        label={`Who is there in ${name}`}
        hideLabel
        className="max-md:col-start-2 md:order-1"
        value={phase.attendance}
        onChange={({ target }) => set({ ...phase, attendance: target.value as Phase['attendance'] }, 'who')}
      >
        <option value="hands">by hand</option>
        <option value="onsite">somebody near</option>
        <option value="none">by itself</option>
      </Select>
      <div className="min-w-0 max-md:col-span-2 md:order-2">
        <SourceSelect phase={phase} name={name} coating={coating} onChange={(next) => set(next, 'source')} />
      </div>
      <Extras way={way} phase={phase} name={name} set={set} />
    </li>
  );
}

type Set = (next: Phase, field: string) => void;

/** What is said of a phase only where it is so. */
function Extras({ way, phase, name, set }: { way: Way; phase: Phase; name: string; set: Set }) {
  const { body } = useEditor();
  const { lamp, wait, perExtraCoat } = phase;
  if (lamp !== true && wait === undefined && perExtraCoat === undefined) return null;
  const label = body.options.find(({ key }) => key === perExtraCoat)?.label ?? perExtraCoat;
  return (
    <div className="col-span-full col-start-2 flex flex-wrap items-center gap-x-4 gap-y-1 text-xs text-muted md:order-4">
      {lamp === true && <span>{way.lampCount > 1 ? 'lamps on' : 'lamp on'}</span>}
      {perExtraCoat !== undefined && <span>each time of “{label}”</span>}
      {wait !== undefined && (
        <span className="flex items-center gap-2">
          may stand after it for
          <MinutesField
            label={`Minutes it may stand after ${name}`}
            hideLabel
            className="w-20"
            value={wait}
            onChange={(minutes) => set({ ...phase, wait: minutes ?? 0 }, 'wait')}
          />
        </span>
      )}
    </div>
  );
}

function PhaseMenu({ stage, way, phase, at, set }: Omit<PhaseRowProps, 'coating'> & { set: Set }) {
  const { edit, body } = useEditor();
  const { lamp, wait, perExtraCoat, ...plain } = phase;
  const without = (part: Partial<Phase>): Phase => ({
    ...plain,
    ...(lamp === undefined ? {} : { lamp }),
    ...(wait === undefined ? {} : { wait }),
    ...(perExtraCoat === undefined ? {} : { perExtraCoat }),
    ...part,
  });
  const drop = (field: 'lamp' | 'wait' | 'perExtraCoat'): Phase => {
    const { [field]: _, ...rest } = without({});
    return rest;
  };
  return (
    <span className="md:order-3">
      <Menu
        trigger={
          <IconButton label={`More of phase ${at + 1}`} size="small" icon={<Ellipsis size={16} aria-hidden="true" />} />
        }
      >
        <MenuItem
          icon={<ArrowUp size={15} aria-hidden="true" />}
          disabled={at === 0}
          onSelect={() => edit(movePhase(stage.key, way.id, at, at - 1))}
        >
          Move up
        </MenuItem>
        <MenuItem
          icon={<ArrowDown size={15} aria-hidden="true" />}
          disabled={at === way.phases.length - 1}
          onSelect={() => edit(movePhase(stage.key, way.id, at, at + 1))}
        >
          Move down
        </MenuItem>
        <MenuLine />
        <MenuItem
          icon={<Flame size={15} aria-hidden="true" />}
          onSelect={() => set(lamp ? drop('lamp') : without({ lamp: true }), 'lamp')}
        >
          {lamp ? 'Lamps off' : 'Lamps on'}
        </MenuItem>
        <MenuItem
          icon={<Hourglass size={15} aria-hidden="true" />}
          onSelect={() => set(wait === undefined ? without({ wait: 10 }) : drop('wait'), 'wait')}
        >
          {wait === undefined ? 'It may stand after this' : 'It may not stand after this'}
        </MenuItem>
        {perExtraCoat !== undefined && (
          <MenuItem icon={<Layers size={15} aria-hidden="true" />} onSelect={() => set(drop('perExtraCoat'), 'extra')}>
            Always there
          </MenuItem>
        )}
        {body.options
          .filter(({ key }) => key !== perExtraCoat)
          .map(({ key, label }) => (
            <MenuItem
              key={key}
              icon={<Layers size={15} aria-hidden="true" />}
              onSelect={() => set(without({ perExtraCoat: key }), 'extra')}
            >
              Each time of “{label}”
            </MenuItem>
          ))}
        <MenuLine />
        <MenuItem
          icon={<Trash2 size={15} aria-hidden="true" />}
          disabled={way.phases.length === 1}
          onSelect={() => edit(removePhase(stage.key, way.id, at))}
        >
          Take it out
        </MenuItem>
      </Menu>
    </span>
  );
}
