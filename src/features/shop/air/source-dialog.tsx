import { Plus, X } from 'lucide-react';
import { useId, useState } from 'react';
import {
  changeZoneAir,
  type AirHours,
  type AirSettings,
  type AirSource,
  type AirView,
  type ZoneAir,
} from '#contracts/air.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Choice } from '#src/ui/choice.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { ChangedMeanwhile } from '../parts/changed-meanwhile.tsx';
import { useAirWrite } from './air-queries.ts';
import { hoursRow, readHours, shownTemperature, type HoursRow } from './model/air-forms.ts';
import { exactTemperature, percent } from './model/air-words.ts';

type SourceDialogProps = { zone: ZoneAir; settings: AirSettings; onClose: () => void };

const sources: { value: AirSource; label: string }[] = [
  { value: 'default', label: 'Usual air' },
  { value: 'latest', label: 'Latest reading' },
  { value: 'schedule', label: 'By the hour' },
];

/** Where the planner takes a zone's air from. */
export function SourceDialog({ zone, settings, onClose }: SourceDialogProps) {
  const shop = useShop();
  const { unit } = useFormats();
  const formId = useId();
  const [source, setSource] = useState(zone.source);
  const usual = {
    celsius: shownTemperature(settings.defaultCelsius, unit),
    humidity: String(settings.defaultHumidity),
  };
  const [rows, setRows] = useState<HoursRow[]>(() =>
    zone.schedule.length > 0 ? zone.schedule.map((row) => hoursRow(row, unit)) : [{ from: '0', to: '24', ...usual }],
  );
  const [fault, setFault] = useState<{ row: number; fault: string } | null>(null);
  const [version, setVersion] = useState(zone.version);
  const write = useAirWrite(changeZoneAir, () => {
    showToast(`The planner’s air in ${zone.name} is saved`, { tone: 'good' });
    onClose();
  });
  const send = (schedule: AirHours[]) =>
    write.mutate(
      { params: { shopId: shop.id, zoneId: zone.id }, body: { version, source, schedule } },
      {
        onError: (error) => {
          if (!isApiError(error, 'stale')) return;
          const now = (error.current as AirView).zones.find(({ id }) => id === zone.id);
          if (now) setVersion(now.version);
        },
      },
    );
  const submit = () => {
    // Hours that are typed and not used are kept for another day where they can be read.
    const read = readHours(rows, unit);
    if (source === 'schedule' && 'fault' in read) return setFault(read);
    setFault(null);
    send('value' in read ? read.value : zone.schedule);
  };
  const isStale = isApiError(write.error, 'stale');
  return (
    <Dialog
      open
      shape="wide"
      onOpenChange={(open) => !open && onClose()}
      title={`The planner’s air in ${zone.name}`}
      about="Flashes and air drying that are planned here take as long as this air asks. What is booked keeps its minutes."
      actions={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button type="submit" form={formId} look="primary" busy={write.isPending}>
            Save
          </Button>
        </>
      }
    >
      <form
        id={formId}
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => {
          event.preventDefault();
          submit();
        }}
      >
        <Choice label="Taken from" options={sources} value={source} onChange={setSource} />
        <p className="text-muted">{aboutSource(source, settings, unit)}</p>
        {source === 'schedule' && <Hours rows={rows} setRows={setRows} fault={fault} usual={usual} />}
        {isStale && <ChangedMeanwhile />}
        {write.error && !isStale && <ErrorNote error={write.error} what="It stays as it was." />}
      </form>
    </Dialog>
  );
}

function aboutSource(source: AirSource, { defaultCelsius, defaultHumidity }: AirSettings, unit: 'C' | 'F'): string {
  const usual = `${exactTemperature(defaultCelsius, unit)}, ${percent(defaultHumidity)}`;
  switch (source) {
    case 'default':
      return `Always the shop’s usual air, ${usual}.`;
    case 'latest':
      return `The newest reading of the last 12 hours; without one the usual air, ${usual}.`;
    case 'schedule':
      return `The air by the hour of the shop’s clock; outside of the rows the usual air, ${usual}. A flash is planned for the slowest hour in which the shop is open, air drying for the slowest of all.`;
    default:
      return source satisfies never;
  }
}

type HoursProps = {
  rows: HoursRow[];
  setRows: (rows: HoursRow[]) => void;
  fault: { row: number; fault: string } | null;
  usual: Pick<HoursRow, 'celsius' | 'humidity'>;
};

function Hours({ rows, setRows, fault, usual }: HoursProps) {
  const { unit } = useFormats();
  const change = (at: number, more: Partial<HoursRow>) =>
    setRows(rows.map((row, i) => (i === at ? { ...row, ...more } : row)));
  const cells = [
    ['from', 'From, h'],
    ['to', 'To, h'],
    ['celsius', `Air, °${unit}`],
    ['humidity', 'Humidity, %'],
  ] as const;
  return (
    <div className="flex flex-col gap-2">
      {rows.map((row, i) => (
        <fieldset key={i} className="flex flex-col gap-1">
          <legend className="sr-only">Row {i + 1}</legend>
          <div className="grid grid-cols-[repeat(4,minmax(0,1fr))_auto] items-end gap-2">
            {cells.map(([key, label]) => (
              <TextField
                key={key}
                label={label}
                hideLabel={i > 0}
                inputMode="decimal"
                autoComplete="off"
                aria-invalid={fault?.row === i ? true : undefined}
                value={row[key]}
                onChange={(event) => change(i, { [key]: event.target.value })}
              />
            ))}
            <IconButton
              label={`Take out row ${i + 1}`}
              icon={<X size={16} />}
              onClick={() => setRows(rows.filter((_, k) => k !== i))}
            />
          </div>
          {fault?.row === i && (
            <p role="alert" className="text-[0.8125rem] font-semibold text-crimson">
              {fault.fault}
            </p>
          )}
        </fieldset>
      ))}
      {fault?.row === -1 && (
        <p role="alert" className="font-semibold text-crimson">
          {fault.fault}
        </p>
      )}
      <Button
        size="small"
        className="self-start"
        icon={<Plus size={15} aria-hidden="true" />}
        disabled={rows.length >= 24}
        onClick={() => setRows([...rows, { from: rows.at(-1)?.to ?? '0', to: '24', ...usual }])}
      >
        Add hours
      </Button>
    </div>
  );
}
