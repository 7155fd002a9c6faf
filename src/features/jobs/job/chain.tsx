import type { Job } from '#contracts/jobs.ts';
import type { PieceKind } from '#src/lib/phase-words.ts';
import { Caution } from '#src/ui/caution.tsx';
import { PhaseLegend } from '#src/ui/phase-bar.tsx';
import { heatLimitOf } from '../model/assumed-limit.ts';
import { piecesOf } from '../model/stage-times.ts';
import { StageItem } from './stage-item.tsx';

const order: PieceKind[] = ['setup', 'work', 'spray', 'flash', 'purge', 'bake', 'cool'];

/** The job's stages from first to last, as a line down the page. */
export function Chain({ job }: { job: Job }) {
  const drawn = new Set(job.stages.flatMap((stage) => piecesOf(stage).map((piece) => piece.kind)));
  const done = job.stages.filter((stage) => stage.state === 'done').length;
  return (
    <section aria-labelledby="chain" className="card p-4">
      <div className="mb-4 flex flex-wrap items-baseline justify-between gap-x-4 gap-y-2">
        <h2 id="chain">
          Stages{' '}
          <span className="figures font-normal text-muted">
            {done} of {job.stages.length} done
          </span>
        </h2>
        <PhaseLegend kinds={order.filter((kind) => drawn.has(kind))} />
      </div>
      <ol>
        {job.stages.map((stage, i) => (
          <StageItem
            key={stage.id}
            jobId={job.id}
            stage={stage}
            isLast={i === job.stages.length - 1}
            isWithdrawn={job.state === 'withdrawn'}
            heatLimit={heatLimitOf(job)}
          />
        ))}
      </ol>
      <div className="mt-5 border-t border-line pt-3">
        <Caution quiet>
          Times and temperatures are those of the process sheet. The makers&rsquo; data sheets, local rules and the
          licensed people responsible come first.
        </Caution>
      </div>
    </section>
  );
}
