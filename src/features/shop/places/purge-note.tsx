import { purgeBeforeHeat } from '#chemistry/purge/purge-minutes.ts';
import { formatDuration } from '#src/lib/formats.ts';
import { readAirFlow, readVolume, type PlaceForm } from './model/place-form.ts';

/** What volume and air flow mean for heat, as they are typed. */
export function PurgeNote({ form }: { form: PlaceForm }) {
  const cubicMetres = readVolume(form.volume);
  const cubicMetresPerHour = readAirFlow(form.airFlow);
  const purge = purgeBeforeHeat({
    cubicMetres: cubicMetres !== null && cubicMetres > 0 ? cubicMetres : null,
    cubicMetresPerHour,
  });
  return (
    <p aria-live="polite" className="rounded border border-line bg-paper px-3.5 py-2.5">
      {purge.heat === 'after-purge' ? (
        <>
          <b>Purge before heat: {formatDuration(purge.wholeMinutes)}</b>
          <span className="text-muted"> (four changes of air, 3 min at least; {sayExact(purge.minutes)})</span>
        </>
      ) : (
        <>
          <b>No heat is planned here</b>
          <span className="text-muted">
            {' '}
            until {purge.code === 'volume-unknown' ? 'the volume is entered' : 'the air flow is entered'}: without it
            the purge is not known.
          </span>
        </>
      )}
    </p>
  );
}

const sayExact = (minutes: number): string => `exactly ${Math.round(minutes * 1000) / 1000} min`;
