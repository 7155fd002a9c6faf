import { memo } from 'react';
import { instantOf } from '#src/lib/wall-clock.ts';
import type { Axis } from '../model/axis.ts';
import { useBoardContext } from './board-context.ts';
import { percent } from './percent.ts';

/** A line of the grid: where it stands, 0 to 1, and the clock time it stands for. */
type Tick = { at: number; day: string; minute: number };

function ticksOf(axis: Axis, every: number): Tick[] {
  const shown = axis.toMinute - axis.fromMinute;
  return axis.days.flatMap((day, i) =>
    Array.from({ length: Math.ceil(shown / every) }, (_, k): Tick => {
      return { at: (i + (k * every) / shown) / axis.days.length, day, minute: axis.fromMinute + k * every };
    }),
  );
}

type Props = { axis: Axis; slotMinutes: number };

/** Hours; above them, where several days are shown, the days. */
export const Hours = memo(function Hours({ axis, slotMinutes }: Props) {
  const { sayTime, sayDay } = useBoardContext();
  const several = axis.days.length > 1;
  const noon = (day: string) => instantOf(day, 720, axis.zone);
  return (
    <div className={several ? 'hours hours-of-days' : 'hours'} aria-hidden="true">
      {several &&
        axis.days.map((day, i) => (
          <span
            key={day}
            className="hours-day"
            style={{ left: percent(i / axis.days.length), width: percent(1 / axis.days.length) }}
          >
            <span>{sayDay(noon(day))}</span>
          </span>
        ))}
      {ticksOf(axis, Math.max(60, slotMinutes)).map(({ at, day, minute }) => (
        <span key={`${day} ${minute}`} className={several ? 'hour hour-tight' : 'hour'} style={{ left: percent(at) }}>
          {sayTime(instantOf(day, minute, axis.zone))}
        </span>
      ))}
    </div>
  );
});

/** The lines behind the rows: each slot, stronger on the hour's label, strongest between days. */
export const Grid = memo(function Grid({ axis, slotMinutes }: Props) {
  const labelled = Math.max(60, slotMinutes);
  return (
    <div className="grid-lines" aria-hidden="true">
      {ticksOf(axis, slotMinutes).map(({ at, day, minute }) => {
        const first = minute === axis.fromMinute && at > 0;
        const strong = (minute - axis.fromMinute) % labelled === 0;
        return (
          <i
            key={`${day} ${minute}`}
            className={first ? 'grid-line grid-day' : strong ? 'grid-line' : 'grid-line grid-minor'}
            style={{ left: percent(at) }}
          />
        );
      })}
    </div>
  );
});
