import { zodResolver } from '@hookform/resolvers/zod';
import { useId, useMemo } from 'react';
import { FormProvider, useForm } from 'react-hook-form';
import type { Job } from '#contracts/jobs.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { useFormats } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { useJobEdit } from '../data/use-job-edit.ts';
import { FactsFields } from '../facts-fields.tsx';
import { changedFacts, factsSchema, typeFacts, type FactValues, type JobFacts } from '../model/job-facts.ts';
import { ChangedMeanwhile } from './changed-meanwhile.tsx';

type ChangeDialogProps = { job: Job; onClose: () => void };

/** Promise, arrival, weight, title, vehicle, battery. Mounted anew each time, so that it starts from what is true. */
export function ChangeDialog({ job, onClose }: ChangeDialogProps) {
  const formats = useFormats();
  const edit = useJobEdit(job);
  const formId = useId();
  const before = useMemo(() => typeFacts(edit.base, formats), [edit.base, formats]);
  const form = useForm<JobFacts, unknown, FactValues>({
    resolver: zodResolver(useMemo(() => factsSchema(formats), [formats])),
    defaultValues: before,
  });
  const fieldsOf = (values: FactValues) => changedFacts(before, form.getValues(), values);
  const save = form.handleSubmit((values) => edit.save(fieldsOf(values), onClose));
  const saveOver = form.handleSubmit((values) => edit.saveOver(fieldsOf(values), onClose));
  return (
    <Dialog
      open
      shape="wide"
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      title={`Change job ${job.number}`}
      about="A later promise or arrival does not move what is planned; plan again for that."
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button look="primary" type="submit" form={formId} busy={edit.busy} disabled={edit.theirs.length > 0}>
            Save
          </Button>
        </>
      }
    >
      <FormProvider {...form}>
        <form id={formId} noValidate className="flex flex-col gap-4" onSubmit={(event) => void save(event)}>
          <ChangedMeanwhile edit={edit} onTakeTheirs={onClose} onSaveOver={() => void saveOver()} />
          {edit.error && (
            <ErrorNote
              error={edit.error}
              what="Not saved."
              kept={isApiError(edit.error, 'bad-request') ? 'What you typed is kept.' : 'What you typed is still here.'}
            />
          )}
          <FactsFields />
        </form>
      </FormProvider>
    </Dialog>
  );
}
