import { X } from 'lucide-react';
import { isApiError } from '#src/lib/api-error.ts';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import type { Bar } from '#contracts/day.ts';
import type { Refused } from './data/use-moves.ts';
import { otherStage } from './model/other-stage.ts';

type Props = { refused: Refused; bars: readonly Bar[]; onClose: () => void };

/** Why a bar went back, in words, until it is read. */
export function RefusedNote({ refused, bars, onClose }: Props) {
  const kept = isApiError(refused.error, 'refused') ? 'It is back where it was.' : 'The board shows how it stands now.';
  return (
    <div className="relative">
      <ErrorNote
        className="pr-12"
        error={refused.error}
        what={`${refused.words} was not moved.`}
        kept={kept}
        subjectOf={otherStage(refused.move.stageId, bars)}
      />
      <div className="absolute top-1.5 right-1.5">
        <IconButton label="Close" size="small" icon={<X size={16} />} onClick={onClose} />
      </div>
    </div>
  );
}
