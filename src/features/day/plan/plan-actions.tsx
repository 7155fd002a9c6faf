import { ChevronDown, Columns2, Trash2, Wand2 } from 'lucide-react';
import { useState } from 'react';
import type { DayView, PlanRun } from '#contracts/day.ts';
import { Button } from '#src/ui/button.tsx';
import { ConfirmDialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { Menu, MenuItem } from '#src/ui/menu.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { useDraftEnd } from '../data/use-draft-deeds.ts';
import type { Planning } from '../data/use-plan-run.ts';
import { isActive } from '../data/use-plan-run.ts';

type Props = { shopId: string; view: DayView; planning: Planning; onCompare: () => void };

/** What can be done with a plan as a whole: have it drafted, compared, posted or dropped. One of them is the main act. */
export function PlanActions({ shopId, view, planning, onCompare }: Props) {
  const [dropping, setDropping] = useState(false);
  const { draft } = view;
  const busy = planning.starting || isActive(planning.run);
  const start = (scope: PlanRun['scope']) => planning.start(scope);
  return (
    <>
      <div className="flex">
        <Button
          className="rounded-r-none border-r-0"
          icon={<Wand2 size={16} />}
          disabled={busy}
          onClick={() => start('rest')}
        >
          Plan the rest
        </Button>
        <Menu
          trigger={
            <Button className="rounded-l-none px-2" disabled={busy} aria-label="Other ways to plan">
              <ChevronDown size={16} />
            </Button>
          }
        >
          <MenuItem onSelect={() => start('rest')}>Plan the rest: what has no place yet</MenuItem>
          <MenuItem onSelect={() => start('all')}>Plan all: move whatever is not begun or pinned</MenuItem>
        </Menu>
      </div>
      {draft && (
        <>
          <IconButton label="Drop the draft" bordered icon={<Trash2 size={16} />} onClick={() => setDropping(true)} />
          <Button look={draft.changes > 0 ? 'primary' : 'plain'} icon={<Columns2 size={16} />} onClick={onCompare}>
            Compare and post
          </Button>
          <DropDialog shopId={shopId} draft={draft} open={dropping} onOpenChange={setDropping} />
        </>
      )}
    </>
  );
}

type DropProps = {
  shopId: string;
  draft: NonNullable<DayView['draft']>;
  open: boolean;
  onOpenChange: (open: boolean) => void;
};

function DropDialog({ shopId, draft, open, onOpenChange }: DropProps) {
  const { drop } = useDraftEnd(shopId);
  const run = () =>
    drop.mutate(draft.version, {
      onSuccess: () => {
        onOpenChange(false);
        showToast('The draft is dropped. The posted plan is as it was.');
      },
    });
  return (
    <ConfirmDialog
      open={open}
      onOpenChange={onOpenChange}
      title="Drop the draft?"
      about={`Its ${draft.changes} ${draft.changes === 1 ? 'change is' : 'changes are'} gone for everyone. The posted plan stays as it is.`}
      deed="Drop the draft"
      busy={drop.isPending}
      onConfirm={run}
    >
      {drop.error && <ErrorNote error={drop.error} what="The draft was not dropped." />}
    </ConfirmDialog>
  );
}
