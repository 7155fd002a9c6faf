import type { DayView } from '#contracts/day.ts';
import type { Formats } from '#src/lib/formats.ts';
import { Badge } from '#src/ui/badge.tsx';
import { WindowGauge } from '#src/ui/window-gauge.tsx';
import type { Drawn } from '../model/board.ts';
import { numbersOf } from '../model/describe.ts';
import { windowOf } from '../model/window-of.ts';
import { BarBody } from '../timeline/bar-body.tsx';

type Props = {
  view: DayView;
  board: readonly Drawn[];
  formats: Formats;
  severalDays: boolean;
  onOpen: (item: Drawn) => void;
};

/** The same day as a list by place, for narrow screens: nothing is squeezed, everything opens the same panel. */
export function DayList({ view, board, formats, severalDays, onOpen }: Props) {
  const places = view.rows.filter(({ kind }) => kind === 'booth' || kind === 'prep' || kind === 'rack');
  const now = Date.parse(view.serverTime);
  return (
    <div className="day-list flex flex-col gap-5">
      {places.map((row) => {
        const items = board.filter((item) => item.kind === 'stage' && item.rowId === row.id);
        return (
          <section key={row.id} aria-labelledby={`place-${row.id}`}>
            <h2 id={`place-${row.id}`} className="mb-1.5 flex items-baseline justify-between">
              {row.name}
              <span className="text-xs font-normal text-muted">{row.zone}</span>
            </h2>
            {row.closed.map((span) => (
              <p key={span.from} className="mb-1.5 rounded bg-amber-soft px-3 py-1.5 text-[0.8125rem]">
                {span.label || 'Closed'}, {formats.span(span.from, span.to)}
              </p>
            ))}
            {items.length === 0 && <p className="text-muted">Nothing booked.</p>}
            <ul className="flex flex-col gap-2">
              {items.map((item) => (
                <li key={item.id}>
                  <StageCard
                    {...{ item, view, formats, severalDays }}
                    isNow={item.from <= now && now < item.to}
                    onOpen={onOpen}
                  />
                </li>
              ))}
            </ul>
          </section>
        );
      })}
    </div>
  );
}

type CardProps = Omit<Props, 'board'> & { item: Drawn; isNow: boolean };

function StageCard({ item, view, formats, severalDays, isNow, onOpen }: CardProps) {
  const { members } = item;
  const [head] = members;
  const lamps = view.rows.filter((row) => head.lampIds.includes(row.id)).map((row) => row.name);
  return (
    <button
      type="button"
      className={`card flex w-full flex-col gap-1.5 p-3 text-left ${isNow ? 'border-ember' : ''}`}
      onClick={() => onOpen(item)}
    >
      <span className="flex w-full flex-wrap items-center gap-x-2 gap-y-1">
        <b className="figures text-base">
          {severalDays ? `${formats.date(item.from)} ` : ''}
          {formats.span(item.from, item.to)}
        </b>
        {head.state !== 'planned' && <Badge tone={head.state === 'done' ? 'moss' : 'petrol'}>{head.state}</Badge>}
        {members.some((bar) => bar.late) && (
          <Badge tone="crimson" solid>
            late
          </Badge>
        )}
        {members.some((bar) => bar.pinned) && <Badge>pinned</Badge>}
        {members.some((bar) => bar.added) && <Badge tone="petrol">new</Badge>}
        {members.some((bar) => bar.posted) && <Badge tone="petrol">moved</Badge>}
      </span>
      <span>
        <b>{numbersOf(members)}</b> {[...new Set(members.map((bar) => bar.partNames))].join(' + ')}
      </span>
      <span className="text-muted">
        {[head.title, head.wayLabel, head.personName, ...lamps].filter(Boolean).join(' · ')}
      </span>
      <BarBody item={item} />
      <WindowGauge window={windowOf(members)} start={head.from} formats={formats} className="w-full" />
    </button>
  );
}
