import { useState } from 'react';
import type { Job } from '#contracts/jobs.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ConfirmDialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { useWithdrawJob } from '../data/use-job-deeds.ts';

/** Asked once, naming the job; it cannot be undone. */
export function Withdraw({ job }: { job: Job }) {
  const [isOpen, setOpen] = useState(false);
  const withdraw = useWithdrawJob(useShop().id, job.id);
  const name = `job ${job.number}, ${job.title}`;
  const onOpenChange = (open: boolean) => {
    setOpen(open);
    withdraw.reset();
  };
  return (
    <>
      <Button look="quiet" onClick={() => onOpenChange(true)}>
        Withdraw
      </Button>
      <ConfirmDialog
        open={isOpen}
        onOpenChange={onOpenChange}
        title={`Withdraw ${name}?`}
        about="It leaves the plan and what it held falls free. What was done stays on record. This cannot be taken back."
        deed="Withdraw the job"
        busy={withdraw.isPending}
        onConfirm={() =>
          withdraw.mutate(job.version, {
            onSuccess: () => {
              setOpen(false);
              showToast(`Withdrew ${name}.`);
            },
          })
        }
      >
        {withdraw.error && <ErrorNote error={withdraw.error} what="It was not withdrawn." />}
      </ConfirmDialog>
    </>
  );
}
