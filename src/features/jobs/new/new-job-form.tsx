import { zodResolver } from '@hookform/resolvers/zod';
import { useEffect, useMemo } from 'react';
import { FormProvider, useForm, useWatch } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import { v7 } from 'uuid';
import type { NewJob } from '#contracts/jobs.ts';
import type { Sheet } from '#contracts/sheets.ts';
import { paths } from '#src/app/paths.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { useMedia } from '#src/lib/use-media.ts';
import { TextArea } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { useCreateJob } from '../data/use-job-deeds.ts';
import { FactsFields } from '../facts-fields.tsx';
import { emptyForm, fromSheet, jobFormSchema, type JobForm } from '../model/job-form.ts';
import { tellFields } from '../tell-fields.ts';
import { Kept, SendBar } from './form-ends.tsx';
import { NotMade } from './not-made.tsx';
import { OptionsField } from './options-field.tsx';
import { PartsEditor } from './parts-editor.tsx';
import { SheetPicker } from './sheet-picker.tsx';
import { StagesToCome } from './stages-to-come.tsx';

type NewJobFormProps = {
  sheets: readonly Sheet[];
  start: JobForm;
  wasKept: boolean;
  keep: (form: JobForm) => void;
  drop: () => void;
};

/** From a process sheet to a job: pick the sheet, give it a title, and everything else may stay as it is. */
export function NewJobForm({ sheets, start, wasKept, keep, drop }: NewJobFormProps) {
  const formats = useFormats();
  const navigate = useNavigate();
  const create = useCreateJob(useShop().id);
  const isWide = useMedia('(min-width: 64rem)');
  const schema = useMemo(() => jobFormSchema(formats), [formats]);
  const form = useForm<JobForm, unknown, NewJob>({ resolver: zodResolver(schema), defaultValues: start });
  const { control, register, setValue, setError, getValues, handleSubmit, formState } = form;
  const { subscribe } = form;
  // Every change is kept in the tab, so that a reload or a wrong link costs nothing.
  useEffect(
    () => subscribe({ formState: { values: true }, callback: ({ values }) => keep(values) }),
    [subscribe, keep],
  );
  const sheetId = useWatch({ control, name: 'sheetId' });
  const sheet = sheets.find(({ id }) => id === sheetId);

  const pick = (picked: Sheet) => {
    const given = fromSheet(picked);
    const check = { shouldValidate: formState.isSubmitted };
    setValue('sheetId', given.sheetId, check);
    setValue('options', given.options, check);
    setValue('parts', given.parts, check);
  };
  const startAnew = () => {
    form.reset(emptyForm(v7(), Date.now(), formats));
    create.reset();
    drop();
  };
  const send = handleSubmit((body) =>
    create.mutate(body, {
      onSuccess: (job) => {
        drop();
        showToast(`Job ${job.number} is made.`, { tone: 'good' });
        void navigate(paths.job(job.id));
      },
      onError: (error) => tellFields(error, setError),
    }),
  );
  const sendAnother = () => {
    setValue('id', v7());
    void send();
  };
  return (
    <FormProvider {...form}>
      <form
        onSubmit={(event) => void send(event)}
        noValidate
        className="grid items-start gap-5 lg:grid-cols-[minmax(0,1fr)_22rem]"
      >
        <div className="flex min-w-0 flex-col gap-6">
          {wasKept && <Kept onAnew={startAnew} />}
          <SheetPicker sheets={sheets} value={sheetId} onPick={pick} error={formState.errors.sheetId?.message} />
          {sheet && (
            <>
              <OptionsField options={sheet.body.options} />
              <PartsEditor />
              {!isWide && <StagesToCome sheet={sheet} />}
            </>
          )}
          <fieldset className="flex min-w-0 flex-col gap-3.5">
            <legend className="mb-2 text-base font-bold">Job</legend>
            <FactsFields />
            <TextArea
              label="Colour note"
              optional
              rows={2}
              error={formState.errors.colourNote?.message}
              {...register('colourNote')}
            />
            <TextArea label="Notes" optional rows={3} error={formState.errors.notes?.message} {...register('notes')} />
          </fieldset>
          {create.error && <NotMade error={create.error} jobId={getValues('id')} onAnother={sendAnother} />}
          <SendBar busy={create.isPending} faulty={formState.isSubmitted && !formState.isValid} />
        </div>
        {isWide && (
          <aside className="sticky top-20 min-w-0">
            <StagesToCome sheet={sheet} />
          </aside>
        )}
      </form>
    </FormProvider>
  );
}
