import type { BenchStage } from '#contracts/bench.ts';
import { cx } from '#src/lib/cx.ts';
import { phaseWords } from '#src/lib/phase-words.ts';
import { useFormats } from '#src/lib/session.ts';
import { PhaseBar, PhaseSwatch } from '#src/ui/phase-bar.tsx';
import { clockAt, countdown, fractionDone, phasesAsRun, type Clock } from './model/phase-clock.ts';
import { StageFacts } from './stage-facts.tsx';
import { PendingMark, TapButton, type OnTap, type Waiting } from './tap-button.tsx';

type RunningStageProps = { stage: BenchStage; now: number; waiting: Waiting; onTap: OnTap };

/** What is under the hands: the clock of its phase, readable at arm's length. */
export function RunningStage({ stage, now, waiting, onTap }: RunningStageProps) {
  const clock = clockAt(stage, now);
  const pieces = phasesAsRun(stage).map(({ kind, from, to }) => ({ kind, size: to - from }));
  return (
    <section
      aria-label={`Now: ${stage.jobNumber} ${stage.title}`}
      className={cx('card flex flex-col gap-4 border-2 border-ember! p-4 sm:p-5', waiting && 'border-dashed')}
    >
      <div className="flex items-baseline justify-between gap-3">
        <h2 className="text-2xl font-bold">{stage.title}</h2>
        <span className="shrink-0 text-base font-bold text-ember">Now</span>
      </div>
      {clock && <BigClock clock={clock} />}
      <PhaseBar pieces={pieces} height="bay" now={fractionDone(stage, now)} className="mt-1" />
      <StageFacts stage={stage} />
      <PendingMark waiting={waiting} />
      <TapButton stage={stage} deed="finish" now={now} waiting={waiting} onTap={onTap} main />
    </section>
  );
}

function BigClock({ clock }: { clock: Clock }) {
  const { time } = useFormats();
  const figures = 'figures text-[clamp(4.5rem,24vw,8rem)] leading-none font-bold tracking-tight';
  if (clock.at === 'over')
    return (
      <div className="text-crimson">
        <p className="text-xl font-bold">Time is up since {time(clock.end)}</p>
        <p role="timer" className={figures}>
          +{countdown(clock.since)}
        </p>
        <p className="text-base text-ink">Tap Done when it is done.</p>
      </div>
    );
  const kind = clock.at === 'phase' ? clock.phase.kind : null;
  const end = clock.at === 'phase' ? clock.phase.to : clock.next.from;
  return (
    <div>
      <p className="flex items-center gap-2.5 text-xl font-bold">
        {kind && <PhaseSwatch kind={kind} className="h-5! w-9!" />}
        {/* Read out when the phase changes, not each second. */}
        <span role="status" className="first-letter:uppercase">
          {kind ? phaseWords[kind] : 'pause'} until {time(end)}
        </span>
      </p>
      {/* Without the word, 10:03 on a wall of times reads as three past ten. */}
      <div className="flex flex-wrap items-baseline gap-x-3">
        <p role="timer" className={figures}>
          {countdown(clock.left)}
        </p>
        <span className="text-2xl font-bold">left</span>
      </div>
      <p className="figures text-base text-muted">
        {clock.next ? `then ${phaseWords[clock.next.kind]}` : 'last phase'} · all over at {time(clock.end)}
      </p>
    </div>
  );
}
