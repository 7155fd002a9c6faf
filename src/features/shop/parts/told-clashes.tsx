import { CalendarClock } from 'lucide-react';
import { Link } from 'react-router-dom';
import type { Clash } from '#contracts/clashes.ts';
import { paths } from '#src/app/paths.ts';
import { reasonText } from '#src/lib/reason-texts.ts';
import { useFormats } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';

type ToldClashesProps = { what: string; clashes: readonly Clash[]; onClose: () => void };

/** What a change means for the posted plan: it is saved, this work stands against it now, and where to plan it again. */
export function ToldClashes({ what, clashes, onClose }: ToldClashesProps) {
  const formats = useFormats();
  if (clashes.length === 0) return null;
  return (
    <section
      role="alert"
      aria-label="Posted work that does not fit any more"
      className="flex flex-col gap-3 rounded border border-amber bg-amber-soft px-4 py-3"
    >
      <div className="flex flex-wrap items-start justify-between gap-3">
        <p className="min-w-0">
          <b>{what} is saved.</b> {clashes.length === 1 ? 'One stage' : `${clashes.length} stages`} of the posted plan
          no longer {clashes.length === 1 ? 'fits' : 'fit'}; it stands until it is planned again.
        </p>
        <Button size="small" onClick={onClose}>
          Understood
        </Button>
      </div>
      <ul className="flex flex-col gap-2">
        {clashes.map((clash) => (
          <li key={clash.stageId} className="flex flex-wrap items-baseline gap-x-4 gap-y-1">
            <span className="min-w-0">
              <Link to={paths.job(clash.jobId)} className="link">
                {clash.jobNumber} {clash.jobTitle}
              </Link>
              , {clash.stageTitle}. {reasonText(clash.reason, formats)}
            </span>
            <Link
              to={paths.day({ date: formats.dayOf(clash.from), stage: clash.stageId })}
              className="link inline-flex items-center gap-1.5 whitespace-nowrap"
            >
              <CalendarClock size={14} aria-hidden="true" />
              {formats.dateSpan(clash.from, clash.to)}
            </Link>
          </li>
        ))}
      </ul>
    </section>
  );
}
