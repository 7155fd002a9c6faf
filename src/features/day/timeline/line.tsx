import { ChevronDown, ChevronRight } from 'lucide-react';
import { memo } from 'react';
import type { Axis } from '../model/axis.ts';
import type { ClosedTime } from '../model/closed-times.ts';
import { Lane } from './lane.tsx';
import type { Heading, LaidRow } from './layout.ts';
import type { RowGroup } from './rows.ts';

type Props = {
  line: LaidRow;
  closed: readonly ClosedTime[];
  axis: Axis;
  laneWidth: number;
  from: number;
  to: number;
  movable: boolean;
};

/** A row: its name, which stays in view, and its lane. */
export const Line = memo(function Line({ line, closed, axis, laneWidth, from, to, movable }: Props) {
  const { row, bars, top, height } = line;
  return (
    <div className="line" role="group" aria-label={row.title} style={{ top, height }}>
      <div className="line-name">
        <b>{row.title}</b>
        <small>{row.facts}</small>
      </div>
      <div className="line-lane" style={{ width: laneWidth }} data-lane={row.id}>
        <Lane {...{ row, bars, closed, axis, from, to, movable }} />
      </div>
    </div>
  );
}, isSameLine);

// Rows are laid out anew with every answer; one that says the same is not drawn again.
function isSameLine(a: Props, b: Props): boolean {
  const { line: x, ...before } = a;
  const { line: y, ...after } = b;
  return (
    x.row === y.row &&
    x.top === y.top &&
    x.height === y.height &&
    x.bars.length === y.bars.length &&
    x.bars.every((bar, i) => bar.item === y.bars[i]?.item && bar.top === y.bars[i]?.top) &&
    (Object.keys(before) as (keyof typeof before)[]).every((key) => before[key] === after[key])
  );
}

/** A group's heading folds its rows away. */
export const GroupHeading = memo(function GroupHeading({
  line,
  onToggle,
}: {
  line: Heading;
  onToggle: (group: RowGroup) => void;
}) {
  const Icon = line.folded ? ChevronRight : ChevronDown;
  return (
    <div className="line line-heading" style={{ top: line.top, height: line.height }}>
      <button type="button" aria-expanded={!line.folded} onClick={() => onToggle(line.group)}>
        <Icon size={14} aria-hidden="true" />
        {line.group}
        <span className="sr-only">, {line.folded ? 'folded' : 'shown'},</span>
        <small>{line.rows}</small>
      </button>
    </div>
  );
});
