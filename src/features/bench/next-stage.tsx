import type { BenchStage } from '#contracts/bench.ts';
import { AirNote } from './air-note.tsx';
import { cx } from '#src/lib/cx.ts';
import { phasesInWords } from '#src/lib/phase-words.ts';
import { useFormats } from '#src/lib/session.ts';
import { PhaseBar } from '#src/ui/phase-bar.tsx';
import { WindowGauge } from '#src/ui/window-gauge.tsx';
import { standingNow, startsIn } from './model/start-words.ts';
import { StageFacts } from './stage-facts.tsx';
import { TapButton, type OnTap, type Waiting } from './tap-button.tsx';

type NextStageProps = { stage: BenchStage; now: number; waiting: Waiting; onTap: OnTap; isOnly: boolean };

/** What to begin next: when, where, whether the chemistry lets it begin now. */
export function NextStage({ stage, now, waiting, onTap, isOnly }: NextStageProps) {
  const { time, duration } = useFormats();
  const isLate = Date.parse(stage.from) < now - 60_000;
  return (
    <section aria-label={`Next: ${stage.jobNumber} ${stage.title}`} className="card flex flex-col gap-4 p-4 sm:p-5">
      <div className="flex items-baseline justify-between gap-3">
        <h2 className="text-2xl font-bold">{stage.title}</h2>
        <span className="shrink-0 text-base font-bold text-muted">Next</span>
      </div>
      <p className="flex flex-wrap items-baseline gap-x-3">
        <time dateTime={stage.from} className="figures text-5xl font-bold">
          {time(stage.from)}
        </time>
        <span className={cx('figures text-lg font-semibold', isLate ? 'text-amber' : 'text-muted')}>
          {startsIn(stage.from, now, duration)}
        </span>
      </p>
      <StageDrawing stage={stage} now={now} />
      <StageFacts stage={stage} />
      <AirNote air={stage.air} />
      {!stage.ready && <p className="text-base font-semibold text-amber">The stage before it is not done yet.</p>}
      <TapButton stage={stage} deed="start" now={now} waiting={waiting} onTap={onTap} main={isOnly && stage.ready} />
    </section>
  );
}

/** Phases with their times, and where now lies in the window. */
export function StageDrawing({ stage, now }: { stage: BenchStage; now: number }) {
  const formats = useFormats();
  const { duration, dayOf, time, dateTime } = formats;
  const when = (at: string) => (dayOf(at) === dayOf(now) ? time(at) : dateTime(at));
  const pieces = stage.phases.map(({ kind, from, to }) => ({
    kind,
    size: (Date.parse(to) - Date.parse(from)) / 60_000,
  }));
  const words = phasesInWords(
    pieces.map(({ kind, size }) => ({ kind, minutes: size })),
    duration,
  );
  const standing = standingNow(stage, now, { duration, when });
  const tones = { early: 'text-muted', room: 'text-petrol', closing: 'text-amber', late: 'text-crimson' };
  return (
    <div className="flex flex-col gap-1.5">
      <PhaseBar pieces={pieces} className="h-9!" />
      <p className="text-base text-muted first-letter:uppercase">{words}</p>
      {standing && (
        <>
          <WindowGauge
            large
            window={stage.window}
            start={new Date(Math.max(now, Date.parse(stage.from))).toISOString()}
            formats={formats}
          />
          <p className={cx('figures text-base font-semibold', tones[standing.tone])}>{standing.words}</p>
        </>
      )}
    </div>
  );
}
