import { useState } from 'react';
import type { Job } from '#contracts/jobs.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { changedSince } from '../model/field-words.ts';
import { sayOf } from '../say.ts';
import { currentOf, useChangeJob, type JobChange } from './use-job-deeds.ts';

/**
 * A change of a job that is begun now and saved later. `theirs` is what others changed in the meantime: nothing is saved
 * over it unless one says so.
 */
export function useJobEdit(job: Job) {
  const formats = useFormats();
  const change = useChangeJob(useShop().id, job.id);
  const [base, setBase] = useState(job);
  const theirs = changedSince(base, job, sayOf(formats));
  const send = (fields: JobChange, version: number, onSaved: () => void) => {
    if (Object.keys(fields).length === 0) return onSaved();
    change.mutate({ ...fields, version }, { onSuccess: onSaved });
  };
  return {
    base,
    theirs,
    by: job.history.find((line) => line.kind === 'job-changed')?.by ?? null,
    busy: change.isPending,
    error: currentOf(change.error) ? null : change.error,
    save: (fields: JobChange, onSaved: () => void) =>
      send(fields, theirs.length > 0 ? base.version : job.version, onSaved),
    saveOver: (fields: JobChange, onSaved: () => void) => {
      setBase(job);
      send(fields, job.version, onSaved);
    },
  };
}
export type JobEdit = ReturnType<typeof useJobEdit>;
