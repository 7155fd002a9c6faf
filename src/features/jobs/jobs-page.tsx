import { useQuery } from '@tanstack/react-query';
import { may, useShop } from '#src/lib/session.ts';
import { Page } from '#src/ui/page.tsx';
import { Tabs } from '#src/ui/tabs.tsx';
import { jobsQuery } from './data/jobs-queries.ts';
import type { Filter } from './model/list-link.ts';
import { JobsFound } from './list/jobs-found.tsx';
import { NewJobButton } from './list/new-job-button.tsx';
import { SearchBox } from './list/search-box.tsx';
import { useListLink } from './list/use-list-link.ts';

const filters: Record<Filter, string> = {
  open: 'Open',
  late: 'Late',
  waiting: 'Waiting',
  planned: 'Planned',
  running: 'Running',
  done: 'Done',
  withdrawn: 'Withdrawn',
  all: 'All',
};

export function Component() {
  const shop = useShop();
  const { link, change } = useListLink();
  const found = useQuery(jobsQuery(shop.id, link));
  const content = <JobsFound found={found} link={link} change={change} />;
  return (
    <Page
      title="Jobs"
      width="wide"
      actions={
        <>
          <SearchBox value={link.q ?? ''} onChange={(q) => change({ q: q || undefined }, 'typing')} />
          {may.keepJobs(shop.role) && <NewJobButton />}
        </>
      }
    >
      <Tabs
        label="Jobs by state"
        value={link.state}
        onChange={(state) => change({ state })}
        tabs={Object.entries(filters).map(([value, label]) => ({ value: value as Filter, label, content }))}
      />
    </Page>
  );
}
