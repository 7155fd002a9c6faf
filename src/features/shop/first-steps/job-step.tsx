import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { v7 } from 'uuid';
import { takeJob, type JobStep as Taken } from '#contracts/first-steps.ts';
import { listSheets } from '#contracts/sheets.ts';
import { paths } from '#src/app/paths.ts';
import { addDays } from '#src/lib/calendar-days.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { instantOf } from '#src/lib/wall-clock.ts';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Select } from '#src/ui/select.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { useTypedForm, type FormRead } from '../parts/use-typed-form.ts';
import { useTakeStep } from './first-steps-query.ts';
import { StepForm } from './step-form.tsx';

type Form = { sheetId: string; title: string; vehicle: string; promise: string };

export function JobStep({ onTaken }: { onTaken: () => void }) {
  const shop = useShop();
  const { zone, today } = useFormats();
  const [ids] = useState(() => ({ jobId: v7(), runId: v7() }));
  const sheets = useQuery({
    queryKey: shopKey(shop.id, 'sheets', 'first-job'),
    queryFn: ({ signal }) => call(listSheets, { params: { shopId: shop.id }, signal }),
  });
  const all = sheets.data?.sheets ?? [];
  const read = (form: Form): FormRead<Form, Taken> => {
    const sheetId = form.sheetId || (all[0]?.id ?? '');
    const promiseAt = form.promise === '' ? null : new Date(instantOf(form.promise, 16 * 60, zone)).toISOString();
    const parsed = takeJob.body.safeParse({
      ...ids,
      sheetId,
      title: form.title,
      vehicle: form.vehicle,
      notes: '',
      promiseAt,
    });
    if (parsed.success) return { value: parsed.data, faults: null };
    const isTitle = parsed.error.issues.some(({ path }) => path[0] === 'title');
    return {
      value: null,
      faults: isTitle ? { title: 'Give the job a title.' } : { sheetId: 'Choose a process sheet.' },
    };
  };
  const { form, change, faults, submit, drop } = useTypedForm<Form, Taken>(
    `first-steps.job.${shop.id}`,
    { sheetId: '', title: 'First job', vehicle: '', promise: addDays(today(), 7) },
    read,
  );
  const take = useTakeStep(takeJob, () => {
    drop();
    onTaken();
  });
  if (sheets.isPending) return <SkeletonLines lines={4} label="Loading the process sheets" />;
  if (sheets.isError)
    return (
      <ErrorNote
        error={sheets.error}
        what="The process sheets could not be loaded."
        retry={() => void sheets.refetch()}
      />
    );
  if (all.length === 0) return <p>A job is made from a process sheet: take step 4 first.</p>;
  return (
    <StepForm
      deed="Take it in and plan"
      busy={take.isPending}
      error={take.error}
      editors={[{ to: paths.newJob(), label: 'All of a new job' }]}
      onSend={() => submit((value) => take.mutate(value))}
    >
      <div className="grid items-start gap-3 sm:grid-cols-2">
        <Select
          label="Process sheet"
          error={faults.sheetId}
          value={form.sheetId}
          onChange={(event) => change({ sheetId: event.target.value })}
        >
          {all.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </Select>
        <TextField
          label="Title"
          error={faults.title}
          value={form.title}
          onChange={(event) => change({ title: event.target.value })}
        />
        <TextField
          label="Vehicle"
          optional
          value={form.vehicle}
          onChange={(event) => change({ vehicle: event.target.value })}
        />
        <TextField
          label="Promised for"
          optional
          type="date"
          value={form.promise}
          onChange={(event) => change({ promise: event.target.value })}
        />
      </div>
      <p className="text-muted">
        The planner then drafts a plan, and the booth day opens. Nothing is posted until you say so.
      </p>
    </StepForm>
  );
}
