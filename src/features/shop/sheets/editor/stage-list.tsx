import { ArrowDown, ArrowUp, CopyPlus, GripVertical, Settings2, Trash2 } from 'lucide-react';
import { useRef, useState, type DragEvent, type KeyboardEvent } from 'react';
import type { SheetStage } from '#contracts/sheets.ts';
import { minutesOf } from '#server/sheets/way-times.ts';
import { cx } from '#src/lib/cx.ts';
import { useFormats } from '#src/lib/session.ts';
import { IconButton } from '#src/ui/icon-button.tsx';
import { PhaseBar } from '#src/ui/phase-bar.tsx';
import { AddStageMenu } from './add-stage-menu.tsx';
import { useEditor } from './editor-context.ts';
import { FaultIcon, FaultPlace } from './fault-place.tsx';
import { useStageDeeds } from './use-stage-deeds.ts';

/** The stages in order. Arrows walk, Alt with an arrow moves, Delete takes out; dragging moves too. */
export function StageList({ chosen }: { chosen: string | null }) {
  const { body, readOnly } = useEditor();
  const deeds = useStageDeeds();
  const list = useRef<HTMLOListElement>(null);
  const [over, setOver] = useState<number | null>(null);
  const dragged = useRef<string | null>(null);
  const focusAt = (at: number): void =>
    list.current?.querySelectorAll<HTMLElement>('[data-stage]')[Math.max(0, at)]?.focus();
  const onKeyDown = (event: KeyboardEvent, at: number, key: string): void => {
    const step = event.key === 'ArrowUp' ? -1 : event.key === 'ArrowDown' ? 1 : 0;
    if (step !== 0) {
      event.preventDefault();
      if (event.altKey && !readOnly) deeds.move(key, at + step);
      else focusAt(at + step);
    } else if (event.key === 'Delete' && !readOnly) {
      event.preventDefault();
      deeds.remove(key);
      requestAnimationFrame(() => focusAt(Math.min(at, body.stages.length - 2)));
    }
  };
  const drop = (event: DragEvent): void => {
    event.preventDefault();
    const from = body.stages.findIndex(({ key }) => key === dragged.current);
    if (over !== null && from >= 0) deeds.move(dragged.current ?? '', over > from ? over - 1 : over);
    setOver(null);
    dragged.current = null;
  };
  return (
    <section aria-label="Stages" className="card flex flex-col">
      <SheetItem chosen={chosen === null} />
      <ol ref={list} onDrop={drop} onDragOver={(event) => event.preventDefault()} className="flex flex-col">
        {body.stages.map((stage, i) => (
          <li
            key={stage.key}
            draggable={!readOnly}
            onDragStart={(event) => {
              dragged.current = stage.key;
              event.dataTransfer.effectAllowed = 'move';
            }}
            onDragEnd={() => setOver(null)}
            onDragOver={(event) => {
              if (dragged.current === null) return;
              const { top, height } = event.currentTarget.getBoundingClientRect();
              setOver(event.clientY > top + height / 2 ? i + 1 : i);
            }}
            className={cx(
              'border-t border-line',
              over === i && 'shadow-[inset_0_3px_0_var(--ember)]',
              over === i + 1 && i === body.stages.length - 1 && 'shadow-[inset_0_-3px_0_var(--ember)]',
            )}
          >
            <StageItem stage={stage} at={i} chosen={stage.key === chosen} onKeyDown={onKeyDown} />
            {stage.key === chosen && !readOnly && <StageDeeds stage={stage} at={i} />}
          </li>
        ))}
      </ol>
      {!readOnly && (
        <FaultPlace stage={null} field="stages" className="border-t border-line p-2.5">
          <AddStageMenu after={chosen} />
        </FaultPlace>
      )}
      <p role="status" className="sr-only">
        {deeds.said}
      </p>
    </section>
  );
}

/** Parts, options and summary: what is the sheet's and no stage's. */
function SheetItem({ chosen }: { chosen: boolean }) {
  const { open, faults } = useEditor();
  const worst = worstOf(faults.filter(({ stage }) => stage === null));
  return (
    <button
      type="button"
      aria-current={chosen ? 'true' : undefined}
      onClick={() => open(null)}
      className={cx('flex min-h-11 items-center gap-2 rounded-t px-3 text-left font-semibold', rowLook(chosen))}
    >
      <Settings2 size={16} aria-hidden="true" />
      <span className="grow">Parts and options</span>
      {worst && <FaultIcon severity={worst} />}
    </button>
  );
}

const rowLook = (chosen: boolean): string =>
  chosen ? 'bg-petrol-soft shadow-[inset_3px_0_0_var(--petrol)]' : 'hover:bg-paper';
const worstOf = (faults: readonly { severity: 'stop' | 'warn' }[]) =>
  faults.find(({ severity }) => severity === 'stop')?.severity ?? faults[0]?.severity;

type StageItemProps = {
  stage: SheetStage;
  at: number;
  chosen: boolean;
  onKeyDown: (event: KeyboardEvent, at: number, key: string) => void;
};

function StageItem({ stage, at, chosen, onKeyDown }: StageItemProps) {
  const { faults, body, open, readOnly } = useEditor();
  const { duration } = useFormats();
  const worst = worstOf(faults.filter((fault) => fault.stage === stage.key));
  const option = stage.option ?? stage.unlessOption;
  const label = body.options.find(({ key }) => key === option)?.label;
  const quickest = stage.ways.toSorted((a, b) => minutesOf(a.phases) - minutesOf(b.phases))[0];
  return (
    <button
      type="button"
      data-stage
      aria-current={chosen ? 'true' : undefined}
      aria-keyshortcuts="Alt+ArrowUp Alt+ArrowDown Delete"
      onClick={() => open(stage.key)}
      onKeyDown={(event) => onKeyDown(event, at, stage.key)}
      className={cx(
        'grid w-full grid-cols-[auto_1.25rem_minmax(0,1fr)_auto] items-center gap-x-1.5 py-2 pr-3 pl-1 text-left',
        rowLook(chosen),
      )}
    >
      <GripVertical
        size={14}
        aria-hidden="true"
        className={cx('text-muted', readOnly ? 'invisible' : 'cursor-grab pointer-coarse:invisible')}
      />
      <span className="figures text-right text-xs text-muted">{at + 1}</span>
      <span className="flex min-w-0 flex-col gap-1 pl-1">
        <span className="truncate font-semibold">{stage.title || 'Without a title'}</span>
        <PhaseBar
          height="line"
          pieces={(quickest?.phases ?? []).map(({ kind, minutes }) => ({ kind, size: Math.max(1, minutes) }))}
        />
        {(label !== undefined || stage.ways.length > 1) && (
          <span className="truncate text-xs text-muted">
            {[
              label === undefined ? '' : `${stage.option === null ? 'not with' : 'with'} ${label}`,
              stage.ways.length > 1 ? `${stage.ways.length} ways` : '',
            ]
              .filter(Boolean)
              .join(' · ')}
          </span>
        )}
      </span>
      <span className="flex flex-col items-end gap-1">
        <span className="figures text-xs text-muted">{duration(minutesOf(quickest?.phases ?? []))}</span>
        {worst && <FaultIcon severity={worst} />}
      </span>
    </button>
  );
}

/** The same deeds for a finger, and to be found. */
function StageDeeds({ stage, at }: { stage: SheetStage; at: number }) {
  const { body } = useEditor();
  const { move, copy, remove, said } = useStageDeeds();
  const { title, key } = stage;
  return (
    <div className="flex items-center gap-1 bg-petrol-soft px-2 pb-1.5 shadow-[inset_3px_0_0_var(--petrol)]">
      <IconButton
        size="small"
        label={`Move ${title} up`}
        shortcut="Alt ↑"
        icon={<ArrowUp size={15} aria-hidden="true" />}
        disabled={at === 0}
        onClick={() => move(key, at - 1)}
      />
      <IconButton
        size="small"
        label={`Move ${title} down`}
        shortcut="Alt ↓"
        icon={<ArrowDown size={15} aria-hidden="true" />}
        disabled={at === body.stages.length - 1}
        onClick={() => move(key, at + 1)}
      />
      <IconButton
        size="small"
        label={`Copy ${title}`}
        icon={<CopyPlus size={15} aria-hidden="true" />}
        onClick={() => copy(key)}
      />
      <IconButton
        size="small"
        label={`Take out ${title}`}
        shortcut="Delete"
        icon={<Trash2 size={15} aria-hidden="true" />}
        onClick={() => remove(key)}
      />
      <span role="status" className="sr-only">
        {said}
      </span>
    </div>
  );
}
