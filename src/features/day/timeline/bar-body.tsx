import type { Drawn } from '../model/board.ts';
import type { Shape, Stretch } from '../model/shape.ts';

const place = ({ left, width }: Stretch) => ({ left: `${left}%`, width: `${width}%` });

/** The phases like coats in a film; after them, outlined, the time for which the place stays taken. */
export function BarBody({ item }: { item: Drawn }) {
  const { shape, members } = item;
  const change = members.some((bar) => bar.added) ? 'new' : members.some((bar) => bar.posted) ? 'moved' : null;
  return (
    <div className="bar-film" aria-hidden="true">
      <div className="bar-body">
        {shape.segments.map((segment) => (
          <i key={`${segment.kind} ${segment.left}`} className={`phase phase-${segment.kind}`} style={place(segment)} />
        ))}
        {shape.seams.map((left) => (
          <i key={left} className="bar-seam" style={{ left: `${left}%` }} />
        ))}
      </div>
      {shape.tail && <i className="bar-tail" style={place(shape.tail)} />}
      {item.kind === 'stage' && change && <i className={`bar-change bar-change-${change}`} />}
    </div>
  );
}

/** From the earliest to the latest start, with a tick where the stage starts. Whole when chosen, else cut short of the neighbours'. */
export function BarWindow({ shape, whole }: { shape: Shape; whole: boolean }) {
  const line = whole ? shape.window : shape.shortWindow;
  const classes = ['bar-line', line.goesOnLeft ? 'goes-on-left' : '', line.goesOnRight ? 'goes-on-right' : ''];
  return (
    <div className={`bar-window tone-${shape.tone}`} aria-hidden="true">
      <i className={classes.filter(Boolean).join(' ')} style={place(line)} />
      <i className="bar-tick" />
    </div>
  );
}
