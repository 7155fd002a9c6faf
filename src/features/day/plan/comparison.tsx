import type { ReactNode } from 'react';
import type { Comparison as Compared } from '#contracts/drafts.ts';
import type { Formats } from '#src/lib/formats.ts';
import { reasonText, ruleText } from '#src/lib/reason-texts.ts';

type Props = { comparison: Compared; formats: Formats };
type Promise = Compared['newlyLate'][number];
type Spot = Compared['moved'][number]['before'];

export function Comparison({ comparison, formats }: Props) {
  const { reasons, newlyLate, saved, told, moved } = comparison;
  return (
    <div className="flex flex-col gap-5">
      {reasons.length > 0 && (
        <Part title="Rules it breaks" tone="crimson">
          <ul className="list-disc pl-4.5">
            {reasons.map((reason, i) => (
              <li key={i}>
                {reasonText(reason, formats)} <span className="text-xs text-muted">{ruleText(reason.rule)}</span>
              </li>
            ))}
          </ul>
        </Part>
      )}
      {newlyLate.length > 0 && (
        <Part title="Turn late" tone="crimson">
          <PromiseList promises={newlyLate} formats={formats} />
        </Part>
      )}
      {saved.length > 0 && (
        <Part title="Saved" tone="moss">
          <PromiseList promises={saved} formats={formats} />
        </Part>
      )}
      {newlyLate.length + saved.length === 0 && <p className="text-muted">No promise is lost or saved by it.</p>}
      <Part title="Who is told when it is posted">
        <p>{told.length === 0 ? 'Nobody: no one’s work changes.' : told.join(', ')}</p>
      </Part>
      <Part title="What changes">
        {moved.length === 0 ? (
          <p>Nothing: the draft is the posted plan.</p>
        ) : (
          <MovedTable moved={moved} formats={formats} />
        )}
      </Part>
    </div>
  );
}

function Part({ title, tone, children }: { title: string; tone?: 'crimson' | 'moss'; children: ReactNode }) {
  const colour = tone === 'crimson' ? 'text-crimson' : tone === 'moss' ? 'text-moss' : '';
  return (
    <section>
      <h3 className={`mb-1 font-bold ${colour}`}>{title}</h3>
      {children}
    </section>
  );
}

const PromiseList = ({ promises, formats }: { promises: Promise[]; formats: Formats }) => (
  <ul className="figures">
    {promises.map((job) => (
      <li key={job.jobId}>
        <b>{job.jobNumber}</b> {job.jobTitle}: promised {formats.dateTime(job.promiseAt)}, ready{' '}
        {formats.dateTime(job.endsAt)}
      </li>
    ))}
  </ul>
);

function MovedTable({ moved, formats }: { moved: Compared['moved']; formats: Formats }) {
  return (
    <div className="overflow-x-auto" tabIndex={0} role="group" aria-label="What changes, as a table">
      <table className="figures w-full text-left text-[0.8125rem]">
        <thead>
          <tr className="border-b border-line text-muted">
            <th className="py-1 pr-4 font-semibold">Job and stage</th>
            <th className="py-1 pr-4 font-semibold">Posted</th>
            <th className="py-1 font-semibold">Draft</th>
          </tr>
        </thead>
        <tbody>
          {moved.map((stage) => (
            <tr key={stage.stageId} className="border-b border-line align-top">
              <th scope="row" className="py-1.5 pr-4 font-normal">
                <b>{stage.jobNumber}</b> {stage.stageTitle}
              </th>
              <td className="py-1.5 pr-4 text-muted">
                {spotWords(stage.before, stage.after, formats) ?? 'not booked'}
              </td>
              <td className="py-1.5">{spotWords(stage.after, stage.before, formats) ?? 'taken out'}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** What differs stands out; what is the same stays quiet. */
function spotWords(spot: Spot, other: Spot, formats: Formats): ReactNode {
  if (!spot) return null;
  const when = formats.dateSpan(spot.from, spot.to);
  const mark = (text: string, same: boolean) => (same || !other ? text : <b>{text}</b>);
  return (
    <>
      {mark(when, spot.from === other?.from)}, {mark(spot.placeName, spot.placeName === other?.placeName)}
      {spot.personName && <>, {mark(spot.personName, spot.personName === other?.personName)}</>}
    </>
  );
}
