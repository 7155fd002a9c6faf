import { X } from 'lucide-react';
import { isApiError } from '#src/lib/api-error.ts';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import type { Refused } from './data/use-moves.ts';

/** Why a bar went back, in words, until it is read. */
export function RefusedNote({ refused, onClose }: { refused: Refused; onClose: () => void }) {
  const kept = isApiError(refused.error, 'refused') ? 'It is back where it was.' : 'The board shows how it stands now.';
  return (
    <div className="relative">
      <ErrorNote className="pr-12" error={refused.error} what={`${refused.words} was not moved.`} kept={kept} />
      <div className="absolute top-1.5 right-1.5">
        <IconButton label="Close" size="small" icon={<X size={16} />} onClick={onClose} />
      </div>
    </div>
  );
}
