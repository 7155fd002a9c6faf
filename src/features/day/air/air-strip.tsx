import { Droplets } from 'lucide-react';
import type { DayView } from '#contracts/day.ts';
import { cx } from '#src/lib/cx.ts';
import { formatDegrees, type Formats } from '#src/lib/formats.ts';

type Air = DayView['air'][number];

/** The air of each zone as it was read last, above the rows. Says in a word where the gate before spraying is shut. */
export function AirStrip({ view, formats }: { view: DayView; formats: Formats }) {
  if (view.air.length === 0) return null;
  return (
    <ul aria-label="Air" className="flex flex-wrap gap-x-5 gap-y-1 text-[0.8125rem] print:hidden">
      {view.air.map((air) => (
        <li
          key={air.zoneId}
          className="figures flex items-center gap-1.5 whitespace-nowrap"
          title={`Read ${formats.dateTime(air.at)}`}
        >
          <Droplets size={14} aria-hidden="true" className={cx('shrink-0', toneOf(air))} />
          <b>{air.name}</b>
          <span>
            {formats.temperature(air.celsius)}, {Math.round(air.humidity)} %
          </span>
          <span className={cx('font-semibold', toneOf(air))}>{marginWords(air, formats)}</span>
        </li>
      ))}
    </ul>
  );
}

const toneOf = ({ gate }: Air): string => (!gate.fresh ? 'text-muted' : gate.open ? 'text-moss' : 'text-crimson');

function marginWords({ gate, at }: Air, formats: Formats): string {
  if (!gate.fresh) return `of ${formats.time(at)}`;
  if (gate.marginCelsius === null) return 'quite dry';
  const margin = `${formatDegrees(gate.marginCelsius, formats.unit)} over dew`;
  return gate.open ? margin : `${margin}: no spraying`;
}
