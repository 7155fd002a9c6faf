import { Check, Pin, Play } from 'lucide-react';
import { Link } from 'react-router-dom';
import type { JobStage } from '#contracts/jobs.ts';
import { cx } from '#src/lib/cx.ts';
import { formatNearDay } from '#src/lib/formats.ts';
import { phasesInWords } from '#src/lib/phase-words.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { PhaseBar } from '#src/ui/phase-bar.tsx';
import { windowWords } from '#src/lib/window-words.ts';
import { WindowGauge } from '#src/ui/window-gauge.tsx';
import { latenessWords, minutesLater, piecesOf } from '../model/stage-times.ts';
import { Traces } from './traces.tsx';
import { WaysOnOffer } from './ways-on-offer.tsx';

type StageItemProps = {
  jobId: string;
  stage: JobStage;
  isLast: boolean;
  isWithdrawn: boolean;
  heatLimit: number | null;
};

/** A knot on the line: when and where the stage is, its phases, its window, its other ways, how it went. */
export function StageItem({ jobId, stage, isLast, isWithdrawn, heatLimit }: StageItemProps) {
  const { duration } = useFormats();
  const pieces = piecesOf(stage);
  const minutes = pieces.reduce((sum, piece) => sum + piece.size, 0);
  const words = phasesInWords(
    pieces.map(({ kind, size }) => ({ kind, minutes: size })),
    duration,
  );
  return (
    <li className="grid grid-cols-[1.75rem_minmax(0,1fr)] gap-x-3">
      <Knot state={stage.state} isLast={isLast} />
      <div className={cx('flex min-w-0 flex-col gap-1.5', isLast ? '' : 'pb-6')}>
        <div className="flex items-baseline justify-between gap-3">
          <h3 className="text-[0.9375rem] font-bold">{stage.title}</h3>
          <span className="figures shrink-0 text-muted">{duration(minutes)}</span>
        </div>
        <Booked stage={stage} isWithdrawn={isWithdrawn} />
        <PhaseBar pieces={pieces} label={words} height={stage.state === 'done' ? 'line' : 'row'} />
        <Happened stage={stage} />
        {stage.overruled && <Overruled overruled={stage.overruled} />}
        <Traces jobId={jobId} stageId={stage.id} />
        <AttachTrace jobId={jobId} stage={stage} />
        {stage.state === 'waiting' && <Window stage={stage} />}
        {stage.state === 'waiting' && (
          <WaysOnOffer ways={stage.ways} chosen={stage.booking?.way ?? null} heatLimit={heatLimit} />
        )}
      </div>
    </li>
  );
}

/** Sprayed under the dew-point gate: who said so, and why. */
function Overruled({ overruled }: { overruled: NonNullable<JobStage['overruled']> }) {
  const { dateTime } = useFormats();
  return (
    <p className="rounded border border-amber bg-amber-soft px-3 py-2 text-[0.8125rem]">
      <b>Sprayed under the dew-point gate.</b> {overruled.reason}
      <span className="text-muted">
        {' '}
        {overruled.by ?? 'Somebody'}, {dateTime(overruled.at)}
      </span>
    </p>
  );
}

/** A logger's record of a bake that has begun is judged and attached at the cure desk. */
function AttachTrace({ jobId, stage }: { jobId: string; stage: JobStage }) {
  const { role } = useShop();
  const bakes = stage.ways.some(({ phases }) => phases.some(({ kind }) => kind === 'bake'));
  if (!bakes || stage.state === 'waiting' || !may.workStages(role)) return null;
  return (
    <Link className="link self-start text-[0.8125rem]" to={`/cure?tab=trace&job=${jobId}&stage=${stage.id}`}>
      Attach a bake trace
    </Link>
  );
}

const knots = {
  waiting: { look: 'border-edge bg-surface', word: 'Waiting', mark: null },
  running: {
    look: 'border-ember bg-ember text-on-ember',
    word: 'Running',
    mark: <Play size={13} aria-hidden="true" />,
  },
  done: { look: 'border-moss bg-moss text-surface', word: 'Done', mark: <Check size={15} aria-hidden="true" /> },
};

function Knot({ state, isLast }: { state: JobStage['state']; isLast: boolean }) {
  const { look, word, mark } = knots[state];
  return (
    <div className="relative flex justify-center">
      {!isLast && (
        <i
          aria-hidden="true"
          className={cx('absolute top-1 -bottom-0.5 w-0.5', state === 'done' ? 'bg-moss' : 'bg-line')}
        />
      )}
      <span className={cx('relative mt-px flex size-6 items-center justify-center rounded-full border-2', look)}>
        {mark}
        <span className="sr-only">{word}</span>
      </span>
    </div>
  );
}

function Booked({ stage, isWithdrawn }: { stage: JobStage; isWithdrawn: boolean }) {
  const { span, dayOf, today } = useFormats();
  const { booking } = stage;
  if (!booking) return <p className="text-muted">{isWithdrawn ? 'Not booked any more' : 'Not planned yet'}</p>;
  const who = booking.personName ?? (booking.personId === null ? null : 'nobody yet');
  return (
    <p className="flex flex-wrap items-center gap-x-2">
      <span className="figures font-semibold">
        {formatNearDay(dayOf(booking.from), today())} {span(booking.from, booking.to)}
      </span>
      <span className="text-muted">
        {[booking.placeName, who, ...booking.lampNames, booking.wayLabel].filter(Boolean).join(' · ')}
      </span>
      {booking.pinned && (
        <span className="inline-flex items-center gap-1 text-xs font-semibold text-muted">
          <Pin size={12} aria-hidden="true" /> pinned
        </span>
      )}
    </p>
  );
}

function Happened({ stage }: { stage: JobStage }) {
  const { dateTime, time, dayOf, duration } = useFormats();
  const { startedAt, finishedAt, booking } = stage;
  if (startedAt === null) return null;
  const later =
    finishedAt === null
      ? minutesLater(startedAt, booking?.from ?? null)
      : minutesLater(finishedAt, booking?.to ?? null);
  const end =
    finishedAt === null
      ? ''
      : `, done ${dayOf(finishedAt) === dayOf(startedAt) ? time(finishedAt) : dateTime(finishedAt)}`;
  const words = latenessWords(later, duration);
  return (
    <p className="figures text-[0.8125rem]">
      Started {dateTime(startedAt)}
      {end}
      {words && <span className={later !== null && later > 15 ? 'text-amber' : 'text-muted'}> · {words}</span>}
    </p>
  );
}

function Window({ stage }: { stage: JobStage }) {
  const formats = useFormats();
  const { window, booking } = stage;
  if (window.earliest === null && window.latest === null) return null;
  if (!booking) return null;
  return (
    <div className="flex flex-col gap-0.5">
      <WindowGauge window={window} start={booking.from} formats={formats} />
      <p aria-hidden="true" className="text-xs text-muted">
        {windowWords(window, booking.from, formats)}
      </p>
    </div>
  );
}
