import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { Reading, ZoneAir } from '#contracts/air.ts';
import { formatDegrees } from '#src/lib/formats.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { Choice } from '#src/ui/choice.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { Table, Td, Th } from '#src/ui/table.tsx';
import { readingsQuery, type Days } from './air-queries.ts';
import { dewOf, pointsOf, type ChartPoint } from './model/air-chart.ts';
import { exactTemperature, percent } from './model/air-words.ts';
import { TimeChart } from './time-chart.tsx';

const spans = [
  { value: '1', label: 'Last day' },
  { value: '7', label: 'Last week' },
] as const;

/** How a zone's air has been: three lines over the hours, and the same in figures. */
export function History({ zone, until }: { zone: ZoneAir; until: string }) {
  const shop = useShop();
  const [days, setDays] = useState<Days>(1);
  const [asTable, setAsTable] = useState(false);
  const readings = useQuery(readingsQuery(shop.id, zone.id, days, until));
  return (
    <div className="flex flex-col gap-3 border-t border-line pt-3">
      <div className="flex flex-wrap items-center justify-between gap-2">
        <Choice
          label={`Span of ${zone.name}`}
          hideLabel
          options={spans}
          value={days === 1 ? '1' : '7'}
          onChange={(value) => setDays(value === '1' ? 1 : 7)}
        />
        <button type="button" className="link py-1 text-[0.8125rem]" onClick={() => setAsTable(!asTable)}>
          {asTable ? 'As charts' : 'As a table'}
        </button>
      </div>
      {readings.isPending && <SkeletonLines lines={5} label={`Loading the readings of ${zone.name}`} />}
      {readings.isError && (
        <ErrorNote
          error={readings.error}
          what="The readings could not be loaded."
          retry={() => void readings.refetch()}
        />
      )}
      {readings.data &&
        (readings.data.readings.length === 0 ? (
          <p className="text-muted">No readings in this time.</p>
        ) : asTable ? (
          <ReadingsTable zone={zone} readings={readings.data.readings} total={readings.data.total} />
        ) : (
          <Charts zone={zone} needed={zone.gate?.neededCelsius ?? 3} {...readings.data} />
        ))}
    </div>
  );
}

type ChartsProps = { zone: ZoneAir; needed: number; readings: Reading[]; from: string; to: string };

function Charts({ zone, needed, readings, from, to }: ChartsProps) {
  const formats = useFormats();
  const { unit } = formats;
  const shown = (celsius: number) => (unit === 'C' ? celsius : celsius * 1.8 + 32);
  const temperature = pointsOf(readings, ({ celsius }) => shown(celsius));
  const humidity = pointsOf(readings, (reading) => reading.humidity);
  const margin = pointsOf(readings, (reading) => {
    const found = dewOf(reading).margin;
    return found === null ? null : unit === 'C' ? found : found * 1.8;
  });
  const common = { from: Date.parse(from), to: Date.parse(to), formats };
  const range = (points: readonly ChartPoint[], after: string): string => {
    const values = points.map(({ value }) => value);
    return values.length === 0
      ? 'no figures'
      : `${Math.min(...values).toFixed(1)} to ${Math.max(...values).toFixed(1)} ${after}`;
  };
  return (
    <div className="flex flex-col gap-2">
      <TimeChart
        {...common}
        label={`Temperature of ${zone.name}: ${range(temperature, `°${unit}`)}`}
        name={`Temperature, °${unit}`}
        points={temperature}
        tone="ember"
        least={unit === 'C' ? 6 : 10}
      />
      <TimeChart
        {...common}
        label={`Humidity of ${zone.name}: ${range(humidity, '%')}`}
        name="Humidity, %"
        points={humidity}
        tone="petrol"
        least={20}
      />
      <TimeChart
        {...common}
        label={`Surface over dew point in ${zone.name}: ${range(margin, `°${unit}`)}; at least ${formatDegrees(needed, unit)} are asked`}
        name={`Surface over dew point, °${unit}`}
        points={margin}
        tone="moss"
        gate={{ value: unit === 'C' ? needed : needed * 1.8, name: `gate ${formatDegrees(needed, unit)}` }}
        least={unit === 'C' ? 6 : 10}
      />
    </div>
  );
}

function ReadingsTable({ zone, readings, total }: { zone: ZoneAir; readings: Reading[]; total: number }) {
  const formats = useFormats();
  const { unit } = formats;
  return (
    <>
      <Table label={`Readings of ${zone.name}`} className="max-h-96">
        <thead>
          <tr>
            <Th>When</Th>
            <Th number>Air</Th>
            <Th number>Humidity</Th>
            <Th number>Surface</Th>
            <Th number>Dew point</Th>
            <Th number>Over it</Th>
          </tr>
        </thead>
        <tbody>
          {readings.toReversed().map((reading) => {
            const { dewPoint, margin } = dewOf(reading);
            return (
              <tr key={reading.id}>
                <Td className="figures whitespace-nowrap">{formats.dateTime(reading.at)}</Td>
                <Td number>{exactTemperature(reading.celsius, unit)}</Td>
                <Td number>{percent(reading.humidity)}</Td>
                <Td number>{reading.surfaceCelsius === null ? '–' : exactTemperature(reading.surfaceCelsius, unit)}</Td>
                <Td number>{dewPoint === null ? '–' : exactTemperature(dewPoint, unit)}</Td>
                <Td number>{margin === null ? '–' : formatDegrees(margin, unit)}</Td>
              </tr>
            );
          })}
        </tbody>
      </Table>
      {total > readings.length && (
        <p className="text-xs text-muted">
          {readings.length} of {total} readings: those with the extremes of each stretch.
        </p>
      )}
    </>
  );
}
