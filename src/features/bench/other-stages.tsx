import { AirNote } from './air-note.tsx';
import { Check, ChevronDown } from 'lucide-react';
import type { BenchStage } from '#contracts/bench.ts';
import { useFormats } from '#src/lib/session.ts';
import { StageDrawing } from './next-stage.tsx';
import { StageFacts } from './stage-facts.tsx';
import { PendingMark, TapButton, type OnTap, type Waiting } from './tap-button.tsx';

type LaterListProps = {
  stages: readonly BenchStage[];
  now: number;
  waitFor: (id: string) => Waiting;
  onTap: OnTap;
};

/** The rest of the day; each opens to all that is known of it and its Start. */
export function LaterList({ stages, now, waitFor, onTap }: LaterListProps) {
  const { span } = useFormats();
  if (stages.length === 0) return null;
  return (
    <section aria-labelledby="later">
      <h2 id="later" className="mb-2 text-lg">
        Later
      </h2>
      <ul className="flex flex-col gap-2.5">
        {stages.map((stage) => (
          <li key={stage.id} className="card">
            <details className="group">
              <summary className="flex min-h-16 list-none items-center gap-3 px-4 py-2.5 [&::-webkit-details-marker]:hidden">
                <span className="min-w-0 grow">
                  <span className="figures block text-lg font-bold">{span(stage.from, stage.to)}</span>
                  <span className="block text-base">
                    <b>{stage.title}</b>
                    <span className="text-muted">
                      {' '}
                      · {stage.jobNumber} {stage.jobTitle} · {stage.placeName}
                    </span>
                  </span>
                </span>
                <ChevronDown size={22} aria-hidden="true" className="shrink-0 text-muted group-open:rotate-180" />
              </summary>
              <div className="flex flex-col gap-4 border-t border-line p-4">
                <StageDrawing stage={stage} now={now} />
                <StageFacts stage={stage} />
                <AirNote air={stage.air} />
                {!stage.ready && (
                  <p className="text-base font-semibold text-amber">The stage before it is not done yet.</p>
                )}
                <TapButton
                  stage={stage}
                  deed="start"
                  now={now}
                  waiting={waitFor(stage.id)}
                  onTap={onTap}
                  main={false}
                />
              </div>
            </details>
          </li>
        ))}
      </ul>
    </section>
  );
}

type DoneListProps = { stages: readonly BenchStage[]; waitFor: (id: string) => Waiting };

export function DoneList({ stages, waitFor }: DoneListProps) {
  const { span } = useFormats();
  if (stages.length === 0) return null;
  return (
    <section aria-labelledby="done">
      <h2 id="done" className="mb-2 text-lg">
        Done
      </h2>
      <ul className="flex flex-col divide-y divide-line">
        {stages.map((stage) => (
          <li key={stage.id} className="flex items-start gap-3 py-2.5 text-base">
            <Check size={20} aria-hidden="true" className="mt-0.5 shrink-0 text-moss" />
            <span className="min-w-0">
              <b>{stage.title}</b>{' '}
              <span className="text-muted">
                · {stage.jobNumber} {stage.jobTitle}
              </span>
              <span className="figures block text-muted">
                {span(stage.startedAt ?? stage.from, stage.finishedAt ?? stage.to)}
              </span>
              <PendingMark waiting={waitFor(stage.id)} />
            </span>
          </li>
        ))}
      </ul>
    </section>
  );
}
