import { Plus, Settings2 } from 'lucide-react';
import type { AirSettings, ZoneAir } from '#contracts/air.ts';
import { cx } from '#src/lib/cx.ts';
import { formatDegrees } from '#src/lib/formats.ts';
import { useFormats } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { History } from './history.tsx';
import { agoWords, exactTemperature, gateWords, percent, sourceWords, type Tone } from './model/air-words.ts';

type ZoneCardProps = {
  zone: ZoneAir;
  settings: AirSettings;
  serverTime: string;
  onRead: (() => void) | null;
  onSource: (() => void) | null;
};

const tones: Record<Tone, string> = {
  moss: 'border-moss',
  amber: 'border-amber bg-amber-soft',
  crimson: 'border-crimson bg-crimson-soft',
  muted: 'border-line text-muted',
};

/** A zone: its air now in big figures, what the gate says, what the planner takes, and how it has been. */
export function ZoneCard({ zone, serverTime, onRead, onSource }: ZoneCardProps) {
  const formats = useFormats();
  const { unit } = formats;
  const { latest, gate } = zone;
  const said = gateWords(gate, unit);
  return (
    <section aria-label={zone.name} className="card flex min-w-0 flex-col gap-3 p-4">
      <header className="flex flex-wrap items-baseline justify-between gap-x-4">
        <h2 className="text-lg">{zone.name}</h2>
        <p className="text-muted">{zone.places.length > 0 ? zone.places.join(', ') : 'no place in it'}</p>
      </header>
      {latest && (
        <dl className="grid grid-cols-2 gap-x-4 gap-y-2 sm:grid-cols-4">
          <Figure name="Air" value={exactTemperature(latest.celsius, unit)} />
          <Figure name="Humidity" value={percent(latest.humidity)} />
          <Figure
            name="Dew point"
            value={gate?.dewPointCelsius == null ? '–' : exactTemperature(gate.dewPointCelsius, unit)}
          />
          <Figure
            name={gate?.surfaceMeasured ? 'Surface over it' : 'Air over it'}
            value={gate?.marginCelsius == null ? '–' : formatDegrees(gate.marginCelsius, unit)}
            bad={gate !== null && !gate.open}
          />
        </dl>
      )}
      <p className={cx('rounded border px-3 py-2', tones[said.tone])}>
        <span className="font-semibold">{said.words}</span>
        {latest && (
          <span className="text-muted">
            {' '}
            Read {agoWords(latest.at, Date.parse(serverTime), formats)},{' '}
            {latest.source === 'key' ? 'by a logger' : latest.source === 'csv' ? 'from a file' : 'by hand'}.
          </span>
        )}
      </p>
      <div className="flex flex-wrap items-center justify-between gap-2">
        <p>
          The planner takes {sourceWords[zone.source]}:{' '}
          <b className="figures">
            {exactTemperature(zone.expected.celsius, unit)}, {percent(zone.expected.humidity)}
          </b>{' '}
          now.
        </p>
        <div className="flex flex-wrap gap-2">
          {onSource && (
            <Button
              size="small"
              icon={<Settings2 size={15} aria-hidden="true" />}
              aria-label={`Planner’s air in ${zone.name}`}
              onClick={onSource}
            >
              Change
            </Button>
          )}
          {onRead && (
            <Button
              size="small"
              icon={<Plus size={15} aria-hidden="true" />}
              aria-label={`Add a reading in ${zone.name}`}
              onClick={onRead}
            >
              Add a reading
            </Button>
          )}
        </div>
      </div>
      <History zone={zone} until={serverTime} />
    </section>
  );
}

const Figure = ({ name, value, bad = false }: { name: string; value: string; bad?: boolean }) => (
  <div>
    <dt className="text-xs text-muted">{name}</dt>
    <dd className={cx('figures text-2xl font-bold whitespace-nowrap', bad && 'text-crimson')}>{value}</dd>
  </div>
);
