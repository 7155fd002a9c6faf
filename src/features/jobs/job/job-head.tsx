import type { ReactNode } from 'react';
import type { Job } from '#contracts/jobs.ts';
import { useFormats } from '#src/lib/session.ts';
import { LateMark, StateMark } from '../job-state.tsx';
import { weightOf } from '../model/weights.ts';

/** What everyone asks first: how it stands, when it is promised, when it ends. */
export function JobHead({ job }: { job: Job }) {
  const { dateTime } = useFormats();
  const when = (at: string | null, none: string) =>
    at === null ? <span className="text-muted">{none}</span> : <time dateTime={at}>{dateTime(at)}</time>;
  return (
    <dl className="card grid grid-cols-2 gap-x-6 gap-y-3 p-4 sm:grid-cols-3 lg:grid-cols-[repeat(5,auto)] lg:justify-between">
      <Fact label="State">
        <StateMark state={job.state} />
      </Fact>
      <Fact label="Promise">
        {when(job.promiseAt, 'none')} {job.late && <LateMark />}
      </Fact>
      <Fact label={job.state === 'done' ? 'Ended' : 'Ends'}>{when(job.endsAt, noEnd[job.state])}</Fact>
      <Fact label="Arrives">{when(job.releaseAt, '')}</Fact>
      <Fact label="Weight">{weightOf(job.weight).word}</Fact>
    </dl>
  );
}

const noEnd: Record<Job['state'], string> = {
  waiting: 'not planned yet',
  planned: 'not known',
  running: 'not all planned',
  done: 'not recorded',
  withdrawn: 'withdrawn',
};

const Fact = ({ label, children }: { label: string; children: ReactNode }) => (
  <div className="min-w-0">
    <dt className="text-xs text-muted">{label}</dt>
    <dd className="mt-0.5 flex flex-wrap items-center gap-2 text-base font-semibold">{children}</dd>
  </div>
);
