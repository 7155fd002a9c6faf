import { Square } from 'lucide-react';
import { useEffect, useState } from 'react';
import type { PlanRun } from '#contracts/day.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Progress } from '#src/ui/progress.tsx';
import { isActive, type Planning } from '../data/use-plan-run.ts';

/** While the planner works: how long, what it has found so far, and a way to stop it with the best kept. */
export function RunStrip({ planning, skew }: { planning: Planning; skew: number }) {
  const { run, error } = planning;
  if (error) return <ErrorNote error={error} what="The planner was not started." />;
  if (run?.state === 'failed')
    return (
      <p role="alert" className="card border-crimson bg-crimson-soft px-4 py-2.5">
        {failure(run)}
      </p>
    );
  return isActive(run) ? <Running planning={planning} run={run} skew={skew} /> : null;
}

const failure = (run: PlanRun) =>
  `The planner could not finish${run.failure ? `: ${run.failure}` : ''}. The draft is as it was; try again.`;

function Running({ planning, run, skew }: { planning: Planning; run: PlanRun; skew: number }) {
  const elapsed = useElapsed(run.startedAt, skew);
  const { progress } = run;
  return (
    <section aria-label="Planning" className="card flex flex-wrap items-center gap-x-5 gap-y-2 px-4 py-2.5">
      <div className="min-w-52 grow">
        <p className="mb-1.5 font-semibold">
          {run.state === 'queued' ? 'Waiting for the planner' : `Planning ${run.scope === 'all' ? 'all' : 'the rest'}`}
        </p>
        <Progress label="Planning" value={run.startedAt === null ? null : Math.min(1, elapsed / run.seconds)} />
      </div>
      <dl className="figures flex flex-wrap gap-x-5 gap-y-1 text-[0.8125rem]">
        <Figure term="Time">
          {Math.min(Math.round(elapsed), run.seconds)} of {run.seconds} s
        </Figure>
        <Figure term="Cost">
          {progress ? Math.round(progress.cost).toLocaleString('en') : '–'}
          {progress?.bound != null && ` (at least ${Math.round(progress.bound).toLocaleString('en')})`}
        </Figure>
        <Figure term="Without a place">{progress ? progress.unplaced : '–'}</Figure>
      </dl>
      <Button size="small" icon={<Square size={14} />} busy={planning.stopping} onClick={planning.stop}>
        Stop, keep the best so far
      </Button>
    </section>
  );
}

function Figure({ term, children }: { term: string; children: React.ReactNode }) {
  return (
    <div className="flex gap-1.5">
      <dt className="text-muted">{term}</dt>
      <dd className="font-semibold">{children}</dd>
    </div>
  );
}

function useElapsed(startedAt: string | null, skew: number): number {
  const [now, setNow] = useState(() => Date.now());
  useEffect(() => {
    const timer = setInterval(() => setNow(Date.now()), 250);
    return () => clearInterval(timer);
  }, []);
  return startedAt === null ? 0 : Math.max(0, (now + skew - Date.parse(startedAt)) / 1000);
}
