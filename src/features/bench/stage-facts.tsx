import { Palette, Users } from 'lucide-react';
import { Link } from 'react-router-dom';
import type { BenchStage } from '#contracts/bench.ts';
import { paths } from '#src/app/paths.ts';

/** Which job and part, where, how, with which lamps; with whom it shares the run; the colour. */
export function StageFacts({ stage }: { stage: BenchStage }) {
  const { jobNumber, jobTitle, jobId, partNames, vehicle, placeName, wayLabel, lampNames, sharedWith, colourNote } =
    stage;
  return (
    <div className="flex flex-col gap-1.5 text-base">
      <p>
        <Link to={paths.job(jobId)} className="link figures">
          {jobNumber}
        </Link>{' '}
        <b>{jobTitle}</b>
        <span className="text-muted">
          {[partNames === jobTitle ? '' : partNames, vehicle].map((text) => text && ` · ${text}`)}
        </span>
      </p>
      <p>
        <b>{placeName}</b>
        <span className="text-muted"> · {[wayLabel, ...lampNames].join(' · ')}</span>
      </p>
      {sharedWith.length > 0 && (
        <p className="flex items-start gap-2">
          <Users size={18} aria-hidden="true" className="mt-0.5 shrink-0 text-muted" />
          <span>Together with {sharedWith.join(', ')}: one tap counts for all.</span>
        </p>
      )}
      {colourNote && (
        <p className="flex items-start gap-2 rounded border border-line bg-paper px-3 py-2">
          <Palette size={18} aria-hidden="true" className="mt-0.5 shrink-0 text-muted" />
          <span className="wrap-anywhere">
            <span className="sr-only">Colour: </span>
            {colourNote}
          </span>
        </p>
      )}
    </div>
  );
}
