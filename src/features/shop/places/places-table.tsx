import type { Place, Zone } from '#contracts/places.ts';
import { useFormats } from '#src/lib/session.ts';
import { Badge } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { Table, Td, Th } from '#src/ui/table.tsx';
import { MoveButtons } from '../parts/move-buttons.tsx';

type PlacesTableProps = {
  title: string;
  kind: Place['kind'];
  places: readonly Place[];
  zones: readonly Zone[];
  /** Absent: looked at only. */
  edit?: ((id: string) => void) | undefined;
  retire: (place: Place) => void;
  onMove: (place: Place, by: -1 | 1) => void;
};

/** Places of one kind, in the order of their rows on the booth day. */
export function PlacesTable({ title, kind, places, zones, edit, retire, onMove }: PlacesTableProps) {
  const isRack = kind === 'rack';
  return (
    <section className="flex flex-col gap-2">
      <h2>{title}</h2>
      <Table label={title}>
        <thead>
          <tr>
            <Th>Name</Th>
            <Th number className="max-sm:hidden">
              Units
            </Th>
            {!isRack && <Th className="max-sm:hidden">Zone</Th>}
            {kind === 'booth' && <Th className="max-sm:hidden">Bakes to</Th>}
            {!isRack && <Th className="max-sm:hidden">Purge before heat</Th>}
            {!isRack && <Th className="max-sm:hidden">Clearance</Th>}
            {edit && (
              <Th>
                <span className="sr-only">What can be done</span>
              </Th>
            )}
          </tr>
        </thead>
        <tbody>
          {places.map((place, i) => (
            <tr key={place.id}>
              <Td className="font-semibold">
                {edit ? (
                  <button
                    type="button"
                    className="min-h-6 text-left underline decoration-line underline-offset-4 hover:decoration-ink"
                    onClick={() => edit(place.id)}
                  >
                    {place.name}
                  </button>
                ) : (
                  place.name
                )}
                <OnPhone place={place} zone={zones.find(({ id }) => id === place.zoneId)?.name ?? null} />
              </Td>
              <Td number className="max-sm:hidden">
                {place.units}
              </Td>
              {!isRack && (
                <Td className="max-sm:hidden">{zones.find(({ id }) => id === place.zoneId)?.name ?? 'its own air'}</Td>
              )}
              {kind === 'booth' && (
                <Td className="max-sm:hidden">
                  <BakesTo place={place} />
                </Td>
              )}
              {!isRack && (
                <Td className="max-sm:hidden">
                  <Purge place={place} />
                </Td>
              )}
              {!isRack && (
                <Td className="whitespace-nowrap max-sm:hidden">
                  {place.clearanceMinutes === 0 ? 'not measured' : `${place.clearanceMinutes} min`}
                </Td>
              )}
              {edit && (
                <Td className="text-right whitespace-nowrap">
                  <span className="inline-flex items-center">
                    <MoveButtons
                      name={place.name}
                      isFirst={i === 0}
                      isLast={i === places.length - 1}
                      onMove={(by) => onMove(place, by)}
                    />
                    <Button size="small" look="quiet" onClick={() => retire(place)}>
                      Retire <span className="sr-only">{place.name}</span>
                    </Button>
                  </span>
                </Td>
              )}
            </tr>
          ))}
        </tbody>
      </Table>
    </section>
  );
}

/** What the other columns say, below the name where there is no room for them. */
function OnPhone({ place, zone }: { place: Place; zone: string | null }) {
  const { units, kind, clearanceMinutes } = place;
  return (
    <span className="block text-xs font-normal text-muted sm:hidden">
      {units} {units === 1 ? 'unit' : 'units'}
      {kind !== 'rack' && (
        <>
          , {zone ?? 'its own air'}
          {place.bakes && (
            <>
              , bakes to <BakesTo place={place} />
            </>
          )}
          , purge <Purge place={place} />
          {clearanceMinutes > 0 && `, clearance ${clearanceMinutes} min`}
        </>
      )}
    </span>
  );
}

function BakesTo({ place }: { place: Place }) {
  const { temperature } = useFormats();
  if (!place.bakes) return <span className="text-muted">does not bake</span>;
  if (place.bakeLimitCelsius === null) return <>{temperature(93, 'limit')} (not entered)</>;
  return <>{temperature(place.bakeLimitCelsius, 'limit')}</>;
}

function Purge({ place }: { place: Place }) {
  const { duration } = useFormats();
  const { minutes, refused } = place.purge;
  if (minutes !== null) return <span className="whitespace-nowrap">{duration(Math.ceil(minutes))}</span>;
  const missing = refused === 'volume-unknown' ? 'volume unknown' : 'air flow unknown';
  return place.kind === 'booth' ? (
    <Badge tone="amber">no heat: {missing}</Badge>
  ) : (
    <span className="text-muted">{missing}</span>
  );
}
