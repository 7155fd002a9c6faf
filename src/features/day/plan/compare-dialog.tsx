import { Send } from 'lucide-react';
import type { DayView } from '#contracts/day.ts';
import { isApiError } from '#src/lib/api-error.ts';
import type { Formats } from '#src/lib/formats.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { useComparison, useDraftEnd } from '../data/use-draft-deeds.ts';
import { Comparison } from './comparison.tsx';

type Props = { shopId: string; draft: NonNullable<DayView['draft']>; formats: Formats; onClose: () => void };

const count = (n: number, one: string) => `${n} ${one}${n === 1 ? '' : 's'}`;

/** Draft beside posted plan: what moves, which promises it costs or saves, who hears of it; and the way to post it. */
export function CompareDialog({ shopId, draft, formats, onClose }: Props) {
  const { post } = useDraftEnd(shopId);
  // Once it is being posted there is soon no draft left to ask about.
  const comparison = useComparison(shopId, draft, post.isIdle || post.isError);
  const { data } = comparison;
  const submit = () =>
    post.mutate(data?.draft.version ?? draft.version, {
      onSuccess: ({ planNumber, changed, letters }) => {
        onClose();
        const mail = letters === 0 ? 'nobody had to be written to' : `${count(letters, 'letter')} on the way`;
        showToast(`Plan ${planNumber} is posted: ${count(changed, 'booking')} changed, ${mail}.`, { tone: 'good' });
      },
    });
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      shape="wide"
      title="Draft beside the posted plan"
      about={data ? aboutOf(data.postedNumber, data.moved.length) : 'Looking at what differs'}
      actions={
        <>
          <Button onClick={onClose}>Back to the board</Button>
          <Button
            look="primary"
            icon={<Send size={16} />}
            busy={post.isPending}
            disabled={!data || data.moved.length === 0}
            onClick={submit}
          >
            Post this plan
          </Button>
        </>
      }
    >
      {post.error && <PostFault error={post.error} />}
      {comparison.error && (
        <ErrorNote
          error={comparison.error}
          what="The comparison could not be loaded."
          retry={() => void comparison.refetch()}
        />
      )}
      {data ? <Comparison comparison={data} formats={formats} /> : comparison.isPending && <SkeletonLines lines={8} />}
    </Dialog>
  );
}

const aboutOf = (postedNumber: number, moved: number) =>
  `${count(moved, 'booking')} would change from ${postedNumber === 0 ? 'an empty plan' : `plan ${postedNumber}`}.`;

function PostFault({ error }: { error: unknown }) {
  const shifted = isApiError(error, 'ground-shifted');
  return (
    <ErrorNote
      className="mb-4"
      error={error}
      what="It was not posted."
      {...(shifted
        ? { kept: 'Work has begun or ended, or another plan was posted since. The draft is kept.' }
        : { kept: 'The draft is kept.' })}
    />
  );
}
