import { Redo2, Undo2 } from 'lucide-react';
import { Button } from '#src/ui/button.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import type { Draft } from './use-draft.ts';

/** Says that these are changes from before, and how to be rid of them. */
export const Kept = ({ onDrop }: { onDrop: () => void }) => (
  <div
    role="status"
    className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 rounded border border-line bg-surface px-3.5 py-2"
  >
    <p>These are your changes as you left them. They are not saved yet.</p>
    <Button size="small" look="quiet" onClick={onDrop}>
      Let them go
    </Button>
  </div>
);

type SaveBarProps = { draft: Draft; stops: number; version: number; onSave: () => void };

/** Stays in reach at the foot, on a phone above the bar with the main places. */
export function SaveBar({ draft, stops, version, onSave }: SaveBarProps) {
  return (
    <div className="sticky bottom-0 z-10 -mx-4 flex flex-wrap items-center gap-x-3 gap-y-2 border-t border-line bg-surface px-4 py-2.5 max-sm:bottom-[calc(3.5rem+env(safe-area-inset-bottom))] sm:-mx-5 sm:px-5">
      <IconButton
        label="Undo"
        shortcut="Ctrl Z"
        icon={<Undo2 size={18} aria-hidden="true" />}
        disabled={!draft.canUndo}
        onClick={draft.undo}
      />
      <IconButton
        label="Redo"
        shortcut="Ctrl Y"
        icon={<Redo2 size={18} aria-hidden="true" />}
        disabled={!draft.canRedo}
        onClick={draft.redo}
      />
      <p role="status" className="min-w-24 grow basis-0 text-[0.8125rem] text-muted">
        {!draft.dirty
          ? version === 1
            ? 'Nothing to save yet.'
            : 'Saved as it stands.'
          : stops > 0
            ? `${stops} to mend before it can be saved.`
            : 'Changed, not saved yet.'}
      </p>
      <Button look="primary" disabled={!draft.dirty || stops > 0} onClick={onSave}>
        Save as version {version}
      </Button>
    </div>
  );
}
