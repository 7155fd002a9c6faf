import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { Paperclip } from 'lucide-react';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { v7 } from 'uuid';
import { listJobs, readJob } from '#contracts/jobs.ts';
import { attachTrace } from '#contracts/traces.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Select } from '#src/ui/select.tsx';
import { coatingsQuery } from './desk-queries.ts';
import type { Judged } from './model/judge.ts';
import { chosenCoating, type Sheet } from './model/sheet-of.ts';
import type { TraceChoice } from './model/trace.ts';
import type { TraceDesk } from './trace-desk.ts';
import { useDesk } from './use-desk.ts';

type AttachProps = { judged: Judged; choice: TraceChoice; desk: TraceDesk; fileName: string; sheet: Sheet };

/** Keeps the record with a job's stage. The server judges it again by the shop's own data sheet. */
export function AttachTrace(props: AttachProps) {
  const shop = useShop();
  const { values, set } = useDesk();
  const jobs = useQuery({
    queryKey: shopKey(shop.id, 'jobs', 'for-trace'),
    queryFn: ({ signal }) =>
      call(listJobs, { params: { shopId: shop.id }, query: { state: 'open', sort: '-number', size: 200 }, signal }),
  });
  const job = useQuery({
    queryKey: shopKey(shop.id, 'job', values.job),
    queryFn: ({ signal }) => call(readJob, { params: { shopId: shop.id, jobId: values.job }, signal }),
    enabled: values.job !== '',
  });
  const attach = useAttach(props);
  if (!may.workStages(shop.role) || values.trace !== '') return null;
  const rows = jobs.data?.rows ?? [];
  // A job that was done meanwhile is not in the list, and may be what the link means.
  const named = job.data && !rows.some(({ id }) => id === job.data.id) ? [job.data] : [];
  return (
    <div className="flex flex-col gap-3 border-t border-line pt-4">
      <h3 className="text-[0.9375rem] font-bold">Attach it to a stage</h3>
      <div className="grid gap-3 sm:grid-cols-2">
        <Select label="Job" value={values.job} onChange={(event) => set({ job: event.target.value, stage: '' })}>
          <option value="">Choose a job</option>
          {[...named, ...rows].map(({ id, number, title }) => (
            <option key={id} value={id}>
              {number} {title}
            </option>
          ))}
        </Select>
        <Select
          label="Stage"
          value={values.stage}
          disabled={!job.data}
          onChange={(event) => set({ stage: event.target.value })}
        >
          <option value="">Choose a stage</option>
          {job.data?.stages.map(({ id, title }) => (
            <option key={id} value={id}>
              {title}
            </option>
          ))}
        </Select>
      </div>
      <div className="flex flex-wrap items-center gap-3">
        <Button
          look="primary"
          icon={<Paperclip size={16} aria-hidden="true" />}
          busy={attach.isPending}
          disabled={values.stage === '' || attach.isSuccess}
          onClick={() => attach.mutate()}
        >
          {attach.isSuccess ? 'Attached' : 'Attach it'}
        </Button>
        {attach.isSuccess && (
          <span role="status">
            It is kept with the stage.{' '}
            <Link className="link" to={`/jobs/${values.job}`}>
              Open the job
            </Link>
          </span>
        )}
      </div>
      {(jobs.error ?? job.error) && <ErrorNote error={jobs.error ?? job.error} what="The jobs could not be loaded." />}
      {attach.error && <ErrorNote error={attach.error} what="The trace was not attached." />}
    </div>
  );
}

function useAttach({ judged, choice, desk, fileName, sheet }: AttachProps) {
  const shop = useShop();
  const client = useQueryClient();
  const { values } = useDesk();
  const { data } = useQuery(coatingsQuery(shop.id));
  const { unit } = useFormats();
  // One id for one record of one stage: sent twice it is kept once.
  const [ids] = useState(() => new Map<string, string>());
  return useMutation({
    mutationFn: async () => {
      const key = JSON.stringify([values.stage, fileName, choice, judged.judgement.doneReferenceMinutes, unit]);
      const id = ids.get(key) ?? v7();
      ids.set(key, id);
      const { rows, hottestCelsius } = await desk.pack(choice);
      const coating = chosenCoating(data?.coatings ?? [], values.coating);
      const points = [sheet.airDry, sheet.bake].flatMap((point) =>
        point ? [{ celsius: point.celsius, minutes: point.minutes }] : [],
      );
      return call(attachTrace, {
        params: { shopId: shop.id, stageId: values.stage },
        body: {
          id,
          fileName: fileName.slice(0, 200),
          coatingId: coating?.id ?? null,
          points: coating ? [] : points,
          earlierMinutes: Number(values.done.replace(',', '.')) || 0,
          limitCelsius: judged.limitCelsius,
          hottestCelsius,
          rows,
        },
      });
    },
    onSettled: () => client.invalidateQueries({ queryKey: shopKey(shop.id, 'job') }),
  });
}
