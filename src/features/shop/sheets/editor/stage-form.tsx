import { Plus, RefreshCw } from 'lucide-react';
import type { SheetStage, Way } from '#contracts/sheets.ts';
import { Button } from '#src/ui/button.tsx';
import { Menu, MenuItem } from '#src/ui/menu.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { addWay, setStage, setStageCondition } from '../model/body-edits.ts';
import { retimedStage } from '../model/retime.ts';
import { belowAt, belowWay } from '../model/stage-templates.ts';
import { airDry, boothBake, byHand, lampCure, sprayWay } from '../model/way-templates.ts';
import { ConditionSelect } from './condition-select.tsx';
import { useEditor } from './editor-context.ts';
import { FaultPlace } from './fault-place.tsx';
import { WayForm } from './way-form.tsx';

/** One stage: what it is, what it puts on, and the ways to do it. */
export function StageForm({ stage }: { stage: SheetStage }) {
  const { body, edit, coatings, faults } = useEditor();
  const at = body.stages.indexOf(stage);
  const set = (part: Partial<SheetStage>, field: string) => edit(setStage(stage.key, part), `${stage.key}.${field}`);
  const own = coatings.find(({ id }) => id === stage.coatingId) ?? null;
  const below = belowAt(body, at, coatings);
  const differs = faults.some((fault) => fault.stage === stage.key && fault.code === 'sheet-differs');
  return (
    <section aria-label={`Stage ${at + 1}: ${stage.title}`} className="flex min-w-0 flex-col gap-4">
      <div className="card flex flex-col gap-3.5 p-4">
        <div className="grid gap-3 sm:grid-cols-[minmax(0,2fr)_minmax(0,1fr)]">
          <FaultPlace stage={stage.key} field="title" also={['stage']}>
            <TextField
              label="Stage"
              value={stage.title}
              maxLength={120}
              autoComplete="off"
              onChange={({ target }) => set({ title: target.value }, 'title')}
            />
          </FaultPlace>
          <TextField
            label="Kind, for reports"
            value={stage.kind}
            maxLength={40}
            list="stage-kinds"
            autoComplete="off"
            onChange={({ target }) => set({ kind: target.value }, 'kind')}
          />
        </div>
        <div className="grid gap-3 sm:grid-cols-2">
          <FaultPlace stage={stage.key} field="coating">
            <Select
              label="Coating it puts on or cures"
              value={stage.coatingId ?? ''}
              onChange={({ target }) => set({ coatingId: target.value === '' ? null : target.value }, 'coating')}
            >
              <option value="">None</option>
              {stage.coatingId !== null && own === null && <option value={stage.coatingId}>Not in use any more</option>}
              {coatings.map(({ id, name }) => (
                <option key={id} value={id}>
                  {name}
                </option>
              ))}
            </Select>
          </FaultPlace>
          <FaultPlace stage={stage.key} field="option">
            <ConditionSelect
              label="The stage is there"
              value={stage}
              onChange={(condition) => edit(setStageCondition(stage.key, condition))}
            />
          </FaultPlace>
        </div>
        {differs && (
          <Button
            size="small"
            className="self-start"
            icon={<RefreshCw size={14} aria-hidden="true" />}
            onClick={() =>
              edit(setStage(stage.key, retimedStage(stage, own ?? below.coating, below.wet ? below.coating : null)))
            }
          >
            Take the times of the data sheet
          </Button>
        )}
      </div>
      <FaultPlace stage={stage.key} field="ways" className="!gap-3">
        {stage.ways.map((way) => (
          <WayForm key={way.id} stage={stage} way={way} below={belowWay(body, stage, way, coatings)} />
        ))}
        <AddWay stage={stage} add={(way) => edit(addWay(stage.key, way))} />
      </FaultPlace>
    </section>
  );
}

function AddWay({ stage, add }: { stage: SheetStage; add: (way: Way) => void }) {
  const { body, coatings, readOnly } = useEditor();
  const below = belowAt(body, body.stages.indexOf(stage), coatings);
  const own = coatings.find(({ id }) => id === stage.coatingId) ?? null;
  const last = stage.ways.at(-1);
  if (readOnly) return null;
  return (
    <Menu
      align="start"
      trigger={
        <Button
          size="small"
          className="self-start"
          icon={<Plus size={14} aria-hidden="true" />}
          disabled={stage.ways.length >= 12}
        >
          Add a way to do it
        </Button>
      }
    >
      <MenuItem onSelect={() => add(boothBake(below))}>Booth bake</MenuItem>
      <MenuItem onSelect={() => add(lampCure(below))}>Cure lamp</MenuItem>
      <MenuItem onSelect={() => add(airDry(below))}>Air dry</MenuItem>
      <MenuItem onSelect={() => add(byHand(30))}>By hand</MenuItem>
      <MenuItem onSelect={() => add(sprayWay(own, own?.kind ?? 'base', { ...below, wet: false }))}>
        Sprayed in a booth
      </MenuItem>
      <MenuItem onSelect={() => add(sprayWay(own, own?.kind ?? 'base', { ...below, wet: true }))}>
        Sprayed on the spot
      </MenuItem>
      {last && (
        <MenuItem onSelect={() => add({ ...structuredClone(last), label: `${last.label}, other` })}>
          Like the last way
        </MenuItem>
      )}
    </Menu>
  );
}
