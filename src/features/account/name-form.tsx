import { useForm } from 'react-hook-form';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { useChangeAccount } from './use-change-account.ts';

export function NameForm({ name }: { name: string }) {
  const change = useChangeAccount();
  const { register, handleSubmit, formState, reset } = useForm({ defaultValues: { name } });
  const keep = handleSubmit((typed) =>
    change.mutate(
      { name: typed.name.trim() },
      {
        onSuccess: (me) => {
          reset({ name: me.account.name });
          showToast('Name kept', { tone: 'good' });
        },
      },
    ),
  );
  return (
    <form noValidate className="flex flex-col items-start gap-3" onSubmit={(event) => void keep(event)}>
      <TextField
        label="Your name"
        hint="As the others in the shop see it."
        autoComplete="name"
        className="w-full max-w-sm"
        maxLength={120}
        error={formState.errors.name?.message}
        {...register('name', { validate: (text) => text.trim() !== '' || 'Enter your name.' })}
      />
      {change.isError && <ErrorNote error={change.error} what="The name could not be kept." />}
      <Button type="submit" busy={change.isPending}>
        Keep the name
      </Button>
    </form>
  );
}
