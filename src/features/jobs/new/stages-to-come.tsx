import { useFormContext, useWatch } from 'react-hook-form';
import type { Sheet } from '#contracts/sheets.ts';
import { useFormats } from '#src/lib/session.ts';
import { phasesInWords, type PieceKind } from '#src/lib/phase-words.ts';
import { PhaseBar, PhaseLegend } from '#src/ui/phase-bar.tsx';
import type { JobForm } from '../model/job-form.ts';
import { leastMinutes, stagesLeft, type StagePreview } from '../model/sheet-stages.ts';

/** The stages the job will go through, as the sheet and the chosen options leave them. */
export function StagesToCome({ sheet }: { sheet: Sheet | undefined }) {
  const { control } = useFormContext<JobForm>();
  const options = useWatch({ control, name: 'options' });
  if (!sheet)
    return (
      <p className="rounded border border-dashed border-edge p-4 text-muted">
        Pick a process sheet, and the stages of the job stand here with their minutes.
      </p>
    );
  return <StageList stages={stagesLeft(sheet.body, options)} />;
}

function StageList({ stages }: { stages: readonly StagePreview[] }) {
  const { duration } = useFormats();
  const most = Math.max(1, ...stages.map((stage) => stage.least));
  const kinds = [...new Set(stages.flatMap((stage) => stage.phases.map((phase): PieceKind => phase.kind)))];
  return (
    <section aria-labelledby="stages-to-come" className="card flex flex-col gap-3 p-4">
      <div className="flex flex-wrap items-baseline justify-between gap-x-3">
        <h2 id="stages-to-come">Stages</h2>
        <p className="figures text-muted" role="status">
          {stages.length === 1 ? '1 stage' : `${stages.length} stages`}, at least {duration(leastMinutes(stages))}
        </p>
      </div>
      <ol className="flex flex-col gap-2.5">
        {stages.map((stage, i) => (
          <li key={stage.key} className="grid grid-cols-[1.25rem_minmax(0,1fr)] gap-x-2">
            <span className="figures text-right text-xs leading-5 text-muted">{i + 1}</span>
            <div className="flex min-w-0 flex-col gap-1">
              <div className="flex items-baseline justify-between gap-2">
                <span className="min-w-0 font-semibold">{stage.title}</span>
                <span className="figures shrink-0 text-xs text-muted">{minutesText(stage, duration)}</span>
              </div>
              <span style={{ width: `${Math.max(4, (stage.least / most) * 100)}%` }}>
                <PhaseBar
                  height="line"
                  label={phasesInWords(stage.phases, duration)}
                  pieces={stage.phases.map(({ kind, minutes }) => ({ kind, size: minutes }))}
                  className="!h-3"
                />
              </span>
              {(stage.ways.length > 1 || stage.wait > 0) && (
                <span className="text-xs text-muted">
                  {[
                    stage.wait > 0 ? `${duration(stage.wait)} after the stage before` : '',
                    stage.ways.length > 1 ? stage.ways.join(', ') : '',
                  ]
                    .filter(Boolean)
                    .join(' · ')}
                </span>
              )}
            </div>
          </li>
        ))}
      </ol>
      <PhaseLegend kinds={kinds} />
    </section>
  );
}

const minutesText = ({ least, most }: StagePreview, duration: (minutes: number) => string): string =>
  least === most ? duration(least) : `${duration(least)} to ${duration(most)}`;
