import { useQuery } from '@tanstack/react-query';
import { ChevronLeft, Pencil } from 'lucide-react';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import type { Job } from '#contracts/jobs.ts';
import { paths } from '#src/app/paths.ts';
import { may, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { jobQuery } from './data/jobs-queries.ts';
import { Chain } from './job/chain.tsx';
import { ChangeDialog } from './job/change-dialog.tsx';
import { History } from './job/history.tsx';
import { JobHead } from './job/job-head.tsx';
import { PartsCard } from './job/parts-card.tsx';
import { TextCard } from './job/text-card.tsx';
import { Withdraw } from './job/withdraw.tsx';

export function Component() {
  const { jobId = '' } = useParams();
  const { data, error, refetch } = useQuery(jobQuery(useShop().id, jobId));
  const note = error && (
    <ErrorNote
      error={error}
      what="The job could not be loaded."
      {...(data ? { kept: 'What is below is as it was.' } : {})}
      retry={() => void refetch()}
    />
  );
  if (!data)
    return (
      <Page title="Job" actions={<AllJobs />}>
        {note ?? <JobToCome />}
      </Page>
    );
  return <JobPage key={data.id} job={data} note={note} />;
}

const AllJobs = () => (
  <Button look="quiet" asChild>
    <Link to={paths.jobs()}>
      <ChevronLeft size={16} aria-hidden="true" />
      All jobs
    </Link>
  </Button>
);

function JobPage({ job, note }: { job: Job; note: React.ReactNode }) {
  const [isChanging, setChanging] = useState(false);
  const mayChange = may.keepJobs(useShop().role) && job.state !== 'withdrawn';
  return (
    <Page
      title={`${job.number} ${job.title}`}
      about={[job.vehicle, job.sheet?.name].filter(Boolean).join(' · ')}
      actions={
        <>
          <AllJobs />
          {mayChange && job.state !== 'done' && <Withdraw job={job} />}
          {mayChange && (
            <Button icon={<Pencil size={15} aria-hidden="true" />} onClick={() => setChanging(true)}>
              Change
            </Button>
          )}
        </>
      }
    >
      {note}
      <JobHead job={job} />
      <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_22rem]">
        <Chain job={job} />
        <aside className="flex min-w-0 flex-col gap-4">
          <PartsCard job={job} />
          <TextCard job={job} field="colourNote" title="Colour note" editable={mayChange} />
          <TextCard job={job} field="notes" title="Notes" editable={mayChange} />
          <History job={job} />
        </aside>
      </div>
      {isChanging && <ChangeDialog job={job} onClose={() => setChanging(false)} />}
    </Page>
  );
}

const JobToCome = () => (
  <div role="status" className="flex flex-col gap-4">
    <span className="sr-only">Loading the job</span>
    <Skeleton className="h-20 w-full rounded" />
    <div className="grid gap-4 lg:grid-cols-[minmax(0,1fr)_22rem]">
      <Skeleton className="h-[28rem] w-full rounded" />
      <Skeleton className="h-64 w-full rounded" />
    </div>
  </div>
);
