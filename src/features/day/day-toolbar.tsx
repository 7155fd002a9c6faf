import { ChevronLeft, ChevronRight, Printer, Redo2, Undo2, Users, ZoomIn, ZoomOut } from 'lucide-react';
import type { DayView } from '#contracts/day.ts';
import { Button } from '#src/ui/button.tsx';
import { Choice } from '#src/ui/choice.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import type { Moves } from './data/use-moves.ts';
import type { DayLink } from './model/day-link.ts';
import { step, type SpanKind } from './model/day-range.ts';
import { zoomed, zooms, type Zoom } from './timeline/scale.ts';

type Props = {
  link: DayLink;
  today: string;
  narrow: boolean;
  view: DayView | undefined;
  canPlan: boolean;
  moves: Moves;
  zoom: Zoom;
  onZoom: (zoom: Zoom) => void;
  onLink: (change: Partial<DayLink>) => void;
};

const spanOptions: { value: SpanKind; label: string }[] = [
  { value: 'day', label: 'Day' },
  { value: 'three', label: '3 days' },
  { value: 'week', label: 'Week' },
];
const planOptions = [
  { value: 'posted', label: 'Posted' },
  { value: 'draft', label: 'Draft' },
] as const;

/** Which stretch of which plan is shown, and how large. */
export function DayToolbar(props: Props) {
  const { link, narrow, view, canPlan, moves, onLink } = props;
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-2" role="group" aria-label="What is shown">
      <DateSteps {...props} />
      <Choice label="Span" hideLabel options={spanOptions} value={link.span} onChange={(span) => onLink({ span })} />
      {view?.draft && (
        <Choice label="Plan" hideLabel options={planOptions} value={view.shown} onChange={(plan) => onLink({ plan })} />
      )}
      <div className="flex items-center gap-1 sm:ml-auto">
        <span role="status" className="text-[0.8125rem] text-muted">
          {moves.pending ? 'Sending the move' : ''}
        </span>
        {canPlan && (
          <>
            <IconButton
              label="Undo the last move"
              shortcut="Ctrl Z"
              icon={<Undo2 size={18} />}
              disabled={!moves.undo}
              onClick={() => moves.undo?.()}
            />
            <IconButton
              label="Redo"
              shortcut="Ctrl Shift Z"
              icon={<Redo2 size={18} />}
              disabled={!moves.redo}
              onClick={() => moves.redo?.()}
            />
          </>
        )}
        {!narrow && <ViewButtons {...props} />}
        <IconButton label="Print the day sheet" icon={<Printer size={18} />} onClick={() => print()} />
      </div>
    </div>
  );
}

function DateSteps({ link, today, onLink }: Props) {
  return (
    <div className="flex items-center gap-1">
      <IconButton
        label="Earlier"
        shortcut="P"
        bordered
        icon={<ChevronLeft size={18} />}
        onClick={() => onLink({ date: step(link.date, link.span, -1) })}
      />
      <Button onClick={() => onLink({ date: today })} disabled={link.date === today}>
        Today
      </Button>
      <IconButton
        label="Later"
        shortcut="N"
        bordered
        icon={<ChevronRight size={18} />}
        onClick={() => onLink({ date: step(link.date, link.span, 1) })}
      />
      <TextField
        label="Go to a day"
        hideLabel
        type="date"
        className="w-38"
        value={link.date}
        onChange={(event) => event.target.value && onLink({ date: event.target.value })}
      />
    </div>
  );
}

function ViewButtons({ link, zoom, onZoom, onLink }: Props) {
  return (
    <>
      <IconButton
        label={link.people ? 'Hide people' : 'Show people'}
        icon={<Users size={18} />}
        aria-pressed={link.people}
        onClick={() => onLink({ people: !link.people })}
      />
      <Button
        size="small"
        look="quiet"
        aria-pressed={link.allHours}
        onClick={() => onLink({ allHours: !link.allHours })}
      >
        {link.allHours ? 'Open hours' : 'All hours'}
      </Button>
      <IconButton
        label="Smaller"
        shortcut="-"
        icon={<ZoomOut size={18} />}
        disabled={zoom === zooms[0]}
        onClick={() => onZoom(zoomed(zoom, -1))}
      />
      <IconButton
        label="Larger"
        shortcut="+"
        icon={<ZoomIn size={18} />}
        disabled={zoom === zooms.at(-1)}
        onClick={() => onZoom(zoomed(zoom, 1))}
      />
    </>
  );
}
