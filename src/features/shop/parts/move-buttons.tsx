import { ArrowDown, ArrowUp } from 'lucide-react';
import { IconButton } from '#src/ui/icon-button.tsx';

type MoveButtonsProps = { name: string; isFirst: boolean; isLast: boolean; onMove: (by: -1 | 1) => void };

/** Moves a row of a list; what stands there is the order of the rows on the booth day. */
export function MoveButtons({ name, isFirst, isLast, onMove }: MoveButtonsProps) {
  return (
    <span className="inline-flex align-middle">
      <IconButton
        size="small"
        label={`Move ${name} up`}
        icon={<ArrowUp size={16} aria-hidden="true" />}
        disabled={isFirst}
        onClick={() => onMove(-1)}
      />
      <IconButton
        size="small"
        label={`Move ${name} down`}
        icon={<ArrowDown size={16} aria-hidden="true" />}
        disabled={isLast}
        onClick={() => onMove(1)}
      />
    </span>
  );
}
