import { Wind } from 'lucide-react';
import { Link } from 'react-router-dom';
import type { AirFigures } from '#contracts/air.ts';
import type { DayView } from '#contracts/day.ts';
import type { Formats } from '#src/lib/formats.ts';
import { Button } from '#src/ui/button.tsx';

type ChangedAirProps = { view: DayView; formats: Formats; replan: (() => void) | null };

/** The posted plan was made with other air than there is: its flashes may be too short, or longer than they need be. */
export function ChangedAir({ view, formats, replan }: ChangedAirProps) {
  const figures = ({ celsius, humidity }: AirFigures) => `${formats.temperature(celsius)}, ${Math.round(humidity)} %`;
  return (
    <div
      role="status"
      className="flex flex-wrap items-center gap-x-4 gap-y-2 rounded border border-amber bg-amber-soft px-3.5 py-2.5"
    >
      <Wind size={18} aria-hidden="true" className="shrink-0 text-amber" />
      <p className="min-w-0 grow basis-64">
        <b>The air has changed since plan {view.posted.number} was made.</b>{' '}
        {view.posted.changedAir.map(({ zoneId, name, then, now }) => (
          <span key={zoneId} className="figures">
            {name}: {figures(then)} then, {figures(now)} now.{' '}
          </span>
        ))}
        Flashes that are booked keep their minutes until you plan anew and post.
      </p>
      <span className="flex items-center gap-3">
        <Link to="/shop/air" className="link">
          Air
        </Link>
        {replan && (
          <Button size="small" onClick={replan}>
            Re-plan
          </Button>
        )}
      </span>
    </div>
  );
}
