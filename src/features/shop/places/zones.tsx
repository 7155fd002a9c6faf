import { useState } from 'react';
import { changeZone, createZone, removeZone, type Place, type Zone } from '#contracts/places.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { useSetUpWrite } from '../parts/use-set-up-write.ts';

type ZonesProps = { zones: readonly Zone[]; places: readonly Place[]; mayWrite: boolean };

/** Air that is shared, and the places in it. */
export function Zones({ zones, places, mayWrite }: ZonesProps) {
  return (
    <section className="flex flex-col gap-2">
      <h2>Zones</h2>
      <p className="max-w-prose text-muted">
        Places that share their air. Spraying in one of them keeps every lamp of the zone off, and readings of the air
        are kept by zone.
      </p>
      <div className="card">
        {zones.length === 0 && <p className="px-4 py-3 text-muted">Every place has air of its own so far.</p>}
        <ul>
          {zones.map((zone) => (
            <ZoneRow
              key={zone.id}
              zone={zone}
              inIt={places.filter((place) => place.zoneId === zone.id && !place.retired)}
              mayWrite={mayWrite}
            />
          ))}
        </ul>
        {mayWrite && <NewZone />}
      </div>
    </section>
  );
}

function ZoneRow({ zone, inIt, mayWrite }: { zone: Zone; inIt: readonly Place[]; mayWrite: boolean }) {
  const shop = useShop();
  const [name, setName] = useState<string | null>(null);
  const rename = useSetUpWrite(changeZone, () => setName(null));
  const remove = useSetUpWrite(removeZone);
  const params = { shopId: shop.id, zoneId: zone.id };
  const places = inIt.map((place) => place.name).join(', ');
  return (
    <li className="flex flex-col gap-2 border-b border-line px-4 py-2 last:border-0">
      {name === null ? (
        <div className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1">
          <p className="min-w-0">
            <b>{zone.name}</b> <span className="text-muted">{places || 'no place yet'}</span>
          </p>
          {mayWrite && (
            <span className="whitespace-nowrap">
              <Button size="small" look="quiet" onClick={() => setName(zone.name)}>
                Rename <span className="sr-only">{zone.name}</span>
              </Button>
              <Button
                size="small"
                look="quiet"
                busy={remove.isPending}
                onClick={() => remove.mutate({ params, body: { version: zone.version } })}
              >
                Remove <span className="sr-only">{zone.name}</span>
              </Button>
            </span>
          )}
        </div>
      ) : (
        <form
          noValidate
          className="flex flex-wrap items-end gap-2"
          onSubmit={(event) => {
            event.preventDefault();
            rename.mutate({ params, body: { version: zone.version, name } });
          }}
        >
          <TextField
            label={`New name of ${zone.name}`}
            className="grow"
            autoComplete="off"
            autoFocus
            value={name}
            onChange={(event) => setName(event.target.value)}
          />
          <Button type="submit" look="primary" busy={rename.isPending}>
            Save
          </Button>
          <Button onClick={() => setName(null)}>Leave it</Button>
        </form>
      )}
      {rename.isError && <ErrorNote error={rename.error} what={`${zone.name} keeps its name.`} />}
      {remove.isError && <ErrorNote error={remove.error} what={`${zone.name} stays.`} />}
    </li>
  );
}

function NewZone() {
  const shop = useShop();
  const [name, setName] = useState('');
  const add = useSetUpWrite(createZone, () => setName(''));
  const fault = isApiError(add.error, 'bad-request') ? (add.error.fields[0]?.message ?? '') : '';
  return (
    <form
      noValidate
      className="flex flex-wrap items-end gap-2 border-t border-line px-4 py-3"
      onSubmit={(event) => {
        event.preventDefault();
        if (name.trim() !== '') add.mutate({ params: { shopId: shop.id }, body: { name } });
      }}
    >
      <TextField
        label="New zone"
        className="max-w-72 grow"
        autoComplete="off"
        error={fault === '' ? undefined : `${fault.charAt(0).toUpperCase()}${fault.slice(1)}.`}
        value={name}
        onChange={(event) => setName(event.target.value)}
      />
      <Button type="submit" busy={add.isPending}>
        Add the zone
      </Button>
      {add.isError && fault === '' && <ErrorNote error={add.error} what="No zone was added." className="w-full" />}
    </form>
  );
}
