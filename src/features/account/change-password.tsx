import { useMutation } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { changePassword, newPassword } from '#contracts/session.ts';
import { call } from '#src/lib/api.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { PasswordField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';

type Typed = { currentPassword: string; newPassword: string };
const empty: Typed = { currentPassword: '', newPassword: '' };

export function ChangePassword({ email }: { email: string }) {
  const { register, handleSubmit, formState, reset, setError } = useForm<Typed>({ defaultValues: empty });
  const change = useMutation({
    mutationFn: (body: Typed) => call(changePassword, { body }),
    onSuccess: () => {
      reset(empty);
      showToast('The new password holds', { tone: 'good' });
    },
    onError: (error) => {
      if (isApiError(error, 'wrong-credentials'))
        setError('currentPassword', { message: 'This is not your password now.' }, { shouldFocus: true });
    },
  });
  const { errors } = formState;
  return (
    <form
      noValidate
      className="flex flex-col items-start gap-4"
      onSubmit={(event) => void handleSubmit((typed) => change.mutate(typed))(event)}
    >
      <input type="hidden" autoComplete="username" value={email} readOnly />
      <PasswordField
        label="Password now"
        autoComplete="current-password"
        className="w-full max-w-sm"
        error={errors.currentPassword?.message}
        {...register('currentPassword', { required: 'Enter the password you have now.' })}
      />
      <PasswordField
        label="New password"
        autoComplete="new-password"
        className="w-full max-w-sm"
        hint="At least 10 characters. Your other devices are signed out."
        error={errors.newPassword?.message}
        {...register('newPassword', {
          validate: (text) => newPassword.safeParse(text).success || 'Between 10 and 200 characters.',
        })}
      />
      {change.isError && !isApiError(change.error, 'wrong-credentials') && (
        <ErrorNote error={change.error} kept="The old password still holds." />
      )}
      <Button type="submit" busy={change.isPending}>
        Change the password
      </Button>
    </form>
  );
}
