import { Link } from 'react-router-dom';
import type { Bar, DayView } from '#contracts/day.ts';
import { paths } from '#src/app/paths.ts';
import type { Formats } from '#src/lib/formats.ts';
import { Badge } from '#src/ui/badge.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { windowWords } from '#src/lib/window-words.ts';
import { WindowGauge } from '#src/ui/window-gauge.tsx';
import type { Moves } from '../data/use-moves.ts';
import { otherStage } from '../model/other-stage.ts';
import { windowOf } from '../model/window-of.ts';
import { MoveForm } from './move-form.tsx';
import { PhaseList } from './phase-list.tsx';
import { StageFacts } from './stage-facts.tsx';

type Props = {
  bar: Bar;
  /** Stages that run with it as one load, itself among them. */
  members: readonly Bar[];
  view: DayView;
  formats: Formats;
  moves: Moves;
  /** Why it cannot be moved here, or null where it can. */
  fixed: string | null;
  onChoose: (stageId: string) => void;
};

/** One stage in words and figures, and the form that moves it. */
export function StagePanel({ bar, members, view, formats, moves, fixed, onChoose }: Props) {
  const window = windowOf(members);
  const { refused } = moves;
  return (
    <div className="flex flex-col gap-4">
      <StageBadges bar={bar} />
      <p>
        <Link className="link" to={paths.job(bar.jobId)}>
          Job {bar.jobNumber}, {bar.jobTitle}
        </Link>
      </p>
      <StageFacts bar={bar} view={view} formats={formats} />
      <section aria-label="Window" className="flex flex-col gap-1">
        <WindowGauge window={window} start={bar.from} formats={formats} large />
        <p className="figures text-[0.8125rem] text-muted">{windowWords(window, bar.from, formats)}</p>
      </section>
      <PhaseList phases={bar.phases} formats={formats} />
      {members.length > 1 && <LoadMembers bar={bar} members={members} onChoose={onChoose} />}
      <ChainNote bar={bar} view={view} formats={formats} />
      {refused?.move.stageId === bar.id && (
        <ErrorNote
          error={refused.error}
          what="It was not moved."
          kept="The bar is back where it was."
          subjectOf={otherStage(bar.id, view.bars)}
        />
      )}
      {fixed === null ? (
        <MoveForm key={bar.id} {...{ bar, view, formats }} pending={moves.pending} onMove={moves.move} />
      ) : (
        <p className="text-muted">{fixed}</p>
      )}
    </div>
  );
}

function StageBadges({ bar }: { bar: Bar }) {
  const states = { planned: 'planned', running: 'running now', done: 'done' } as const;
  return (
    <div className="flex flex-wrap gap-1.5">
      <Badge tone={bar.state === 'done' ? 'moss' : bar.state === 'running' ? 'petrol' : 'plain'}>
        {states[bar.state]}
      </Badge>
      {bar.late && (
        <Badge tone="crimson" solid>
          late
        </Badge>
      )}
      {bar.pinned && <Badge>pinned</Badge>}
      {bar.added && <Badge tone="petrol">new in this draft</Badge>}
      {bar.posted && <Badge tone="petrol">moved in this draft</Badge>}
    </div>
  );
}

function LoadMembers({ bar, members, onChoose }: Pick<Props, 'bar' | 'members' | 'onChoose'>) {
  return (
    <section aria-label="Load">
      <h3 className="text-[0.8125rem] font-semibold">One load of {members.length}; they move together</h3>
      <ul>
        {members.map((member) => (
          <li key={member.id}>
            {member.id === bar.id ? (
              <b>{member.jobNumber} </b>
            ) : (
              <button type="button" className="link min-h-6" onClick={() => onChoose(member.id)}>
                {member.jobNumber}
              </button>
            )}{' '}
            {member.partNames}
          </li>
        ))}
      </ul>
    </section>
  );
}

function ChainNote({ bar, view, formats }: Pick<Props, 'bar' | 'view' | 'formats'>) {
  const next = bar.chain.flatMap((id) => view.bars.find((one) => one.id === id) ?? []);
  if (next.length === 0) return null;
  const words = next.map((one) => `${one.title.toLowerCase()} ${formats.time(one.from)}`).join(', then ');
  return <p className="text-[0.8125rem] text-muted">Stays where it is for {words}; these move with it.</p>;
}
