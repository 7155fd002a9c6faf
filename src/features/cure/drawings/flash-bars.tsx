import { useFormats } from '#src/lib/session.ts';
import { cx } from '#src/lib/cx.ts';
import type { FlashAnswer, TimeRow } from '../model/flash.ts';
import { useWidth } from './use-width.ts';

const names: Record<TimeRow['key'], string> = {
  between: 'Flash between coats',
  next: 'Flash before the next material',
  heat: 'Flash before heat',
  dry: 'Air dry',
};

/** One pair of bars a time: solid in today's air, the outline as the sheet prints it. Air dry is on a scale of its own. */
export function FlashBars({ answer: { rows } }: { answer: FlashAnswer }) {
  const longest = Math.max(
    1,
    ...rows.filter(({ key }) => key !== 'dry').flatMap(({ printed, today }) => [printed, today]),
  );
  return (
    <ul aria-label="Least times" className="flex flex-col gap-3">
      {rows.map((row) => (
        <Row key={row.key} row={row} longest={row.key === 'dry' ? Math.max(row.printed, row.today) : longest} />
      ))}
    </ul>
  );
}

function Row({ row: { key, printed, today }, longest }: { row: TimeRow; longest: number }) {
  const { duration } = useFormats();
  const [ref, width] = useWidth(400);
  const long = (minutes: number) => Math.max(2, (minutes / longest) * (width - 2));
  return (
    <li ref={ref} className="flex min-w-0 flex-col gap-1">
      <div className="flex flex-wrap items-baseline justify-between gap-x-3">
        <span className="font-semibold">{names[key]}</span>
        <span className="figures">
          <strong className="text-base">{printed === 0 ? 'none' : duration(today)}</strong>
          {printed > 0 && today !== printed && <span className="text-muted"> (sheet: {duration(printed)})</span>}
        </span>
      </div>
      {printed > 0 && (
        <svg aria-hidden="true" width={width} height={14} className="block max-w-full">
          <rect
            x={1}
            y={2}
            height={10}
            width={long(today)}
            rx={2}
            className={cx(today > printed ? 'fill-amber' : 'fill-petrol', 'opacity-70')}
          />
          <rect x={1} y={1} height={12} width={long(printed)} rx={2} className="fill-transparent stroke-ink" />
        </svg>
      )}
    </li>
  );
}
