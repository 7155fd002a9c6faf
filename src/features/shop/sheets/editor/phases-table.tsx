import { ArrowDown, ArrowUp, Plus, Trash2 } from 'lucide-react';
import { minutesFromSheet } from '#chemistry/sheets/minutes-from-sheet.ts';
import type { PhaseKind } from '#contracts/common.ts';
import type { Coating, PhaseSource } from '#contracts/coatings.ts';
import type { Phase, SheetStage, Way } from '#contracts/sheets.ts';
import { phaseWords } from '#src/lib/phase-words.ts';
import { useFormats } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { PhaseBar } from '#src/ui/phase-bar.tsx';
import { Select } from '#src/ui/select.tsx';
import { movePhase, putPhases, removePhase, setPhase } from '../model/body-edits.ts';
import { phase as newPhase, sourced } from '../model/phases.ts';
import type { Below } from '../model/way-templates.ts';
import { useEditor } from './editor-context.ts';
import { MinutesField } from './figure-field.tsx';

type PhasesTableProps = { stage: SheetStage; way: Way; below: Below };

/** The phases of a way in order, each with its minutes and who has to be there. */
export function PhasesTable({ stage, way, below }: PhasesTableProps) {
  const { edit, coatings, readOnly } = useEditor();
  const own = coatings.find(({ id }) => id === stage.coatingId) ?? null;
  const coating = own ?? below.coating;
  const { length } = way.phases;
  return (
    <fieldset className="flex min-w-0 flex-col gap-2">
      <legend className="mb-2 font-bold">Phases</legend>
      <PhaseBar pieces={way.phases.map(({ kind, minutes }) => ({ kind, size: Math.max(1, minutes) }))} />
      <ol className="flex flex-col divide-y divide-line">
        {way.phases.map((phase, i) => (
          <PhaseRow key={i} stage={stage} way={way} phase={phase} at={i} coating={coating} />
        ))}
      </ol>
      {!readOnly && (
        <div className="flex flex-wrap gap-2">
          <Button
            size="small"
            icon={<Plus size={14} aria-hidden="true" />}
            disabled={length >= 40}
            onClick={() => edit(putPhases(stage.key, way.id, length, [newPhase('work', 15, 'hands')]))}
          >
            Add a phase
          </Button>
          <Button
            size="small"
            icon={<Plus size={14} aria-hidden="true" />}
            disabled={length >= 39}
            onClick={() => edit(putPhases(stage.key, way.id, afterLastCoat(way), oneMoreCoat(way, coating)))}
          >
            Add a coat
          </Button>
        </div>
      )}
    </fieldset>
  );
}

const afterLastCoat = ({ phases }: Way): number => phases.findLastIndex(({ kind }) => kind === 'spray') + 1;

/** One more coat like the last, with the flash that belongs before it. */
function oneMoreCoat({ phases }: Way, coating: Coating | null): Phase[] {
  const last = phases.findLast(({ kind }) => kind === 'spray');
  const { perExtraCoat: _, ...coat } = last ?? newPhase('spray', 7, 'hands', coating ? { source: 'coat' } : {});
  return last ? [{ kind: 'flash', attendance: 'hands', ...sourced('flash-between', coating, 10) }, coat] : [coat];
}

type PhaseRowProps = { stage: SheetStage; way: Way; phase: Phase; at: number; coating: Coating | null };

function PhaseRow({ stage, way, phase, at, coating }: PhaseRowProps) {
  const { edit, readOnly, body } = useEditor();
  const set = (next: Phase, field: string) =>
    edit(setPhase(stage.key, way.id, at, next), `${stage.key}.${way.id}.${at}.${field}`);
  const name = `phase ${at + 1}`;
  const counted = body.options;
  return (
    <li
      aria-label={`Phase ${at + 1}: ${phaseWords[phase.kind]}`}
      className="grid grid-cols-2 items-start gap-x-2 gap-y-1.5 py-2 sm:grid-cols-[8rem_5rem_8.5rem_minmax(0,1fr)_auto]"
    >
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
      <Select
        label={`Who is there in ${name}`}
        hideLabel
        value={phase.attendance}
        onChange={({ target }) => set({ ...phase, attendance: target.value as Phase['attendance'] }, 'who')}
      >
        <option value="hands">by hand</option>
        <option value="onsite">somebody near</option>
        <option value="none">by itself</option>
      </Select>
      <SourceSelect phase={phase} name={name} coating={coating} onChange={(next) => set(next, 'source')} />
      {!readOnly && <RowDeeds stage={stage} way={way} at={at} />}
      <div className="col-span-full flex flex-wrap items-start gap-x-5 gap-y-1">
        {(way.lampCount > 0 || phase.lamp === true) && (
          <Checkbox
            label="Lamps on"
            checked={phase.lamp === true}
            onChange={({ target }) => {
              const { lamp: _, ...rest } = phase;
              set(target.checked ? { ...rest, lamp: true } : rest, 'lamp');
            }}
          />
        )}
        {(phase.wait !== undefined || at < way.phases.length - 1) && (
          <details open={phase.wait !== undefined || undefined} className="text-[0.8125rem]">
            <summary className="min-h-control-small text-muted">
              {phase.wait === undefined ? 'May stand after it' : 'May stand after it for'}
            </summary>
            <MinutesField
              label={`Minutes it may stand after ${name}`}
              hideLabel
              nullable
              placeholder="Not at all"
              className="w-32"
              value={phase.wait ?? null}
              onChange={(wait) => {
                const { wait: _, ...rest } = phase;
                set(wait === null || wait === 0 ? rest : { ...rest, wait }, 'wait');
              }}
            />
          </details>
        )}
        {(counted.length > 0 || phase.perExtraCoat !== undefined) && (
          <Select
            label={`Extra coat of ${name}`}
            hideLabel
            className="w-60"
            value={phase.perExtraCoat ?? ''}
            onChange={({ target }) => {
              const { perExtraCoat: _, ...rest } = phase;
              set(target.value === '' ? rest : { ...rest, perExtraCoat: target.value }, 'extra');
            }}
          >
            <option value="">Always there</option>
            {counted.map(({ key, label }) => (
              <option key={key} value={key}>{`Each time of “${label}”`}</option>
            ))}
          </Select>
        )}
      </div>
    </li>
  );
}

const kinds: readonly PhaseKind[] = ['setup', 'work', 'spray', 'flash', 'purge', 'bake', 'cool'];

function withoutSource({ source: _, ...phase }: Phase): Phase {
  return phase;
}

function RowDeeds({ stage, way, at }: { stage: SheetStage; way: Way; at: number }) {
  const { edit } = useEditor();
  return (
    <span className="flex justify-end">
      <IconButton
        size="small"
        label={`Move phase ${at + 1} up`}
        icon={<ArrowUp size={14} aria-hidden="true" />}
        disabled={at === 0}
        onClick={() => edit(movePhase(stage.key, way.id, at, at - 1))}
      />
      <IconButton
        size="small"
        label={`Move phase ${at + 1} down`}
        icon={<ArrowDown size={14} aria-hidden="true" />}
        disabled={at === way.phases.length - 1}
        onClick={() => edit(movePhase(stage.key, way.id, at, at + 1))}
      />
      <IconButton
        size="small"
        label={`Take out phase ${at + 1}`}
        icon={<Trash2 size={14} aria-hidden="true" />}
        disabled={way.phases.length === 1}
        onClick={() => edit(removePhase(stage.key, way.id, at))}
      />
    </span>
  );
}

/** Lines of a data sheet that a phase of each kind can be taken from. */
const linesOf: Partial<Record<PhaseKind, readonly PhaseSource[]>> = {
  spray: ['coat'],
  flash: ['flash-between', 'flash-next', 'flash-heat', 'air'],
  bake: ['bake', 'lamp-short', 'lamp-medium'],
};
const lineWords: Record<PhaseSource, string> = {
  coat: 'a coat of the sheet',
  'flash-between': 'flash between coats',
  'flash-next': 'flash before next',
  'flash-heat': 'flash before heat',
  bake: 'bake',
  'lamp-short': 'short-wave lamp',
  'lamp-medium': 'medium-wave lamp',
  air: 'air dry',
};

type SourceSelectProps = { phase: Phase; name: string; coating: Coating | null; onChange: (phase: Phase) => void };

function SourceSelect({ phase, name, coating, onChange }: SourceSelectProps) {
  const { duration } = useFormats();
  const lines = (linesOf[phase.kind] ?? []).filter(
    (source) =>
      source === 'coat' || source === phase.source || (coating && minutesFromSheet(source, coating.sheet) !== null),
  );
  if (lines.length === 0 || (coating === null && phase.source === undefined)) return <span className="max-sm:hidden" />;
  const says = (source: PhaseSource): number | null => coating && minutesFromSheet(source, coating.sheet);
  return (
    <Select
      label={`Where ${name} comes from`}
      hideLabel
      value={phase.source ?? ''}
      onChange={({ target }) => {
        const source = target.value as PhaseSource | '';
        if (source === '') onChange(withoutSource(phase));
        else onChange({ ...phase, source, minutes: says(source) ?? phase.minutes });
      }}
    >
      <option value="">the shop’s own</option>
      {lines.map((source) => {
        const minutes = says(source);
        return (
          <option key={source} value={source}>
            {minutes === null ? lineWords[source] : `${lineWords[source]}, ${duration(minutes)}`}
          </option>
        );
      })}
    </Select>
  );
}
