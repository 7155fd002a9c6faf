import { cx } from '#src/lib/cx.ts';
import { phaseWords } from '#src/lib/phase-words.ts';
import { PhaseLegend } from '#src/ui/phase-bar.tsx';
import { phaseClass } from '#src/ui/phase-class.ts';
import { doings, hoursText, shareText, stackOf } from './model/shares.ts';
import type { Group, Place } from './report.tsx';

/** A bar for each place, all on one scale of hours, with a mark where its open hours end. */
export function PlaceBars({ groups, scale }: { groups: readonly Group[]; scale: number }) {
  const kinds = doings.filter((doing) => groups.some((group) => group.all.hours[doing] > 0));
  return (
    <section aria-labelledby="hours-drawn" className="card flex flex-col gap-4 p-4 break-inside-avoid">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-2">
        <h2 id="hours-drawn">Hours by what the place did</h2>
        <PhaseLegend kinds={kinds} />
      </div>
      {groups.map(({ kind, title, places }) => (
        <div key={kind} className="flex flex-col gap-2">
          <h3 className="text-xs font-semibold text-muted">{title}</h3>
          {places.map((each) => (
            <PlaceBar key={each.place.placeId} {...each} scale={scale} />
          ))}
        </div>
      ))}
      <p className="text-xs text-muted">
        The upright mark is the end of the open hours; what reaches beyond was done outside of them.
      </p>
    </section>
  );
}

function PlaceBar({ place, figures, scale }: Place & { scale: number }) {
  const { segments, openMark } = stackOf(figures, scale);
  const words = segments.map(({ doing, hours }) => `${phaseWords[doing]} ${hoursText(hours)} h`).join(', ');
  return (
    <div className="grid grid-cols-[6.5rem_minmax(0,1fr)_3rem] items-center gap-3 sm:grid-cols-[9rem_minmax(0,1fr)_3.5rem]">
      <span className="min-w-0 truncate font-semibold">{place.name}</span>
      <span role="img" aria-label={`${place.name}: ${words || 'nothing'}`} className="relative block h-7">
        {segments.map(({ doing, hours, left, width }) => (
          <i
            key={doing}
            title={`${phaseWords[doing]} ${hoursText(hours)} h`}
            className={cx(
              'absolute inset-y-0.5 border-y border-edge',
              doing === 'free' ? 'border-dotted' : 'border-x',
              phaseClass[doing],
            )}
            style={{ left: `${left}%`, width: `${width}%` }}
          />
        ))}
        <i className="absolute -inset-y-0.5 w-0.5 -translate-x-1/2 bg-ink" style={{ left: `${openMark}%` }} />
      </span>
      <span className="figures text-right font-semibold">{shareText(figures.share)}</span>
    </div>
  );
}
