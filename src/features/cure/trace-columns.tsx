import { useFormats } from '#src/lib/session.ts';
import { SelectField } from './desk-fields.tsx';
import type { TimeUnit } from './model/csv/layout.ts';
import { timeFits, timeUnits } from './model/judge.ts';
import type { TraceHead } from './model/trace-engine.ts';
import { unitOf } from './model/trace.ts';
import { Card } from './sections.tsx';
import { useDesk } from './use-desk.ts';

const timeNames: Record<TimeUnit, string> = {
  ms: 'milliseconds',
  s: 'seconds',
  min: 'minutes',
  h: 'hours',
  'hh:mm': 'hours and minutes',
  'mm:ss': 'minutes and seconds',
};
const delimiters = { '\t': 'tabs', ';': 'semicolons', ',': 'commas' };

/** How the file was understood, and the way to put it right. */
export function TraceColumns({ table }: { table: TraceHead }) {
  const { values } = useDesk();
  const { unit: mine } = useFormats();
  const { layout, columns } = table;
  const { kind, unit, name } = layout.time;
  const many = columns.length > 1;
  const times = timeUnits.filter((time) => timeFits(kind, time));
  const named = columns.every((column) => column.unit !== null);
  const warm = columns.some((column) => column.unit === null && column.hottest > 110);
  return (
    <Card title="How it was read">
      <p className="text-xs text-muted">
        Cells parted by {delimiters[layout.delimiter]}; readings from line {layout.dataLine + 1}; time in “{name}”
        {kind === 'date' ? ', dates' : ` in ${timeNames[unit]}`}.
      </p>
      <div className="flex flex-col gap-3">
        <SelectField
          name="col"
          label="Temperature"
          options={[
            ...(many ? [['', 'The coldest of all'] as const] : []),
            ...columns.map((column, i) => [many || i > 0 ? String(i) : '', column.name] as const),
          ]}
        />
        <SelectField
          name="unit"
          label="Readings are in"
          options={[
            [
              '',
              named
                ? `As named: ${[...new Set(columns.map((column) => `°${unitOf(column, null)}`))].join(' and ')}`
                : 'No unit named: °C',
            ],
            ['C', '°C'],
            ['F', '°F'],
          ]}
        />
        {times.length > 1 && (
          <SelectField
            name="clock"
            label="Times are in"
            options={[['', `As guessed: ${timeNames[unit]}`], ...times.map((time) => [time, timeNames[time]] as const)]}
          />
        )}
      </div>
      {warm && values.unit === '' && (
        <p role="status" className="text-xs font-semibold text-amber">
          No unit is named, and some readings are over 110: are they in °F{mine === 'F' ? ', as yours' : ''}?
        </p>
      )}
    </Card>
  );
}
