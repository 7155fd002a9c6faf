import { useQuery } from '@tanstack/react-query';
import { Settings2 } from 'lucide-react';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { exportReadings, importReadings, type AirView, type ZoneAir } from '#contracts/air.ts';
import { formatDegrees } from '#src/lib/formats.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Caution } from '#src/ui/caution.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { CsvPanel } from '../parts/csv-panel.tsx';
import { airQuery } from './air-queries.ts';
import { exactTemperature, percent } from './model/air-words.ts';
import { ReadingDialog } from './reading-dialog.tsx';
import { SettingsDialog } from './settings-dialog.tsx';
import { SourceDialog } from './source-dialog.tsx';
import { ZoneCard } from './zone-card.tsx';

const columns =
  'One line a reading: zone (its name), at (2027-03-31 14:05 by the shop’s clock, or with an offset), celsius, humidity and, if measured, surface celsius. Always in °C. The same file taken twice adds nothing.';

export function Component() {
  const shop = useShop();
  const air = useQuery(airQuery(shop.id));
  const canPlan = may.plan(shop.role);
  const [settingUp, setSettingUp] = useState(false);
  return (
    <Page
      title="Air"
      about={shop.name}
      actions={
        <>
          <CsvPanel
            what="air readings"
            exportFrom={exportReadings}
            importTo={canPlan ? importReadings : undefined}
            columns={columns}
          />
          {canPlan && air.data && (
            <Button icon={<Settings2 size={16} aria-hidden="true" />} onClick={() => setSettingUp(true)}>
              Shop&rsquo;s air
            </Button>
          )}
        </>
      }
    >
      {air.isPending && <SkeletonLines lines={8} label="Loading the air" />}
      {air.isError && (
        <ErrorNote
          error={air.error}
          what={air.data ? 'The air could not be brought up to date.' : 'The air could not be loaded.'}
          retry={() => void air.refetch()}
        />
      )}
      {air.data && <Zones air={air.data} />}
      {air.data && settingUp && <SettingsDialog settings={air.data.settings} onClose={() => setSettingUp(false)} />}
    </Page>
  );
}

function Zones({ air }: { air: AirView }) {
  const { role } = useShop();
  const [reading, setReading] = useState<ZoneAir | null>(null);
  const [sourcing, setSourcing] = useState<ZoneAir | null>(null);
  if (air.zones.length === 0)
    return (
      <EmptyState
        title="The shop has no zones yet"
        action={
          <Link className="link" to="/shop/places">
            Booths and stations
          </Link>
        }
      >
        A zone is air that places share: a booth by itself, or a bay of several stations. Each has its own readings
        here.
      </EmptyState>
    );
  return (
    <>
      <SettingsLine air={air} />
      <div className="grid items-start gap-4 xl:grid-cols-2">
        {air.zones.map((zone) => (
          <ZoneCard
            key={zone.id}
            zone={zone}
            settings={air.settings}
            serverTime={air.serverTime}
            onRead={may.workStages(role) ? () => setReading(zone) : null}
            onSource={may.plan(role) ? () => setSourcing(zone) : null}
          />
        ))}
      </div>
      <Caution quiet>
        The maker&rsquo;s data sheet says in which air its product may be sprayed, and comes first. No published formula
        joins flash and humidity: what damp air adds is the shop&rsquo;s own factor on the data sheet. Minutes are the
        least; the look of the film decides.
      </Caution>
      {reading && <ReadingDialog zone={reading} onClose={() => setReading(null)} />}
      {sourcing && <SourceDialog zone={sourcing} settings={air.settings} onClose={() => setSourcing(null)} />}
    </>
  );
}

function SettingsLine({ air: { settings } }: { air: AirView }) {
  const { unit, duration } = useFormats();
  return (
    <p className="text-muted">
      Usual air {exactTemperature(settings.defaultCelsius, unit)}, {percent(settings.defaultHumidity)}. Spraying needs a
      surface {formatDegrees(settings.marginCelsius, unit)} over the dew point; a reading counts for{' '}
      {duration(settings.freshMinutes)}. A posted plan is out of date when the air changes by more than{' '}
      {formatDegrees(settings.staleCelsius, unit)} or {settings.staleHumidity} % humidity.
    </p>
  );
}
