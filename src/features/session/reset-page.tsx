import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { Link } from 'react-router-dom';
import { resetPassword } from '#contracts/session.ts';
import { paths } from '#src/app/paths.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { call } from '#src/lib/api.ts';
import { meQuery } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { PasswordField } from '#src/ui/text-field.tsx';
import { isNewPassword, newPasswordHint } from './checks.ts';
import { DoorCard } from './door-card.tsx';
import { NoToken } from './no-token.tsx';
import { useLinkToken } from './use-link-token.ts';

const anew = { to: paths.forgotten(), label: 'Ask for a new letter' };

export function Component() {
  const token = useLinkToken();
  return token === null ? <NoToken title="New password" next={anew} /> : <NewPassword token={token} />;
}

function NewPassword({ token }: { token: string }) {
  const client = useQueryClient();
  const { register, handleSubmit, formState } = useForm({ defaultValues: { password: '' } });
  const reset = useMutation({
    mutationFn: ({ password }: { password: string }) => call(resetPassword, { body: { token, password } }),
    // A new password ends every session, this browser's too.
    onSuccess: () => client.setQueryData(meQuery.queryKey, null),
  });
  if (reset.isSuccess)
    return (
      <DoorCard title="The new password holds">
        <p role="status">You were signed out everywhere. Sign in with the new password.</p>
        <Button asChild look="primary">
          <Link to={paths.signIn()}>Sign in</Link>
        </Button>
      </DoorCard>
    );
  const isGone = isApiError(reset.error, 'gone', 'not-found');
  return (
    <DoorCard title="New password">
      <form
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => void handleSubmit((typed) => reset.mutate(typed))(event)}
      >
        <PasswordField
          label="New password"
          autoComplete="new-password"
          autoFocus
          hint={newPasswordHint}
          error={formState.errors.password?.message}
          {...register('password', { validate: isNewPassword })}
        />
        {reset.isError && (
          <ErrorNote error={reset.error}>
            {isGone && (
              <Link to={anew.to} className="link">
                {anew.label}
              </Link>
            )}
          </ErrorNote>
        )}
        <Button type="submit" look="primary" busy={reset.isPending}>
          Keep it
        </Button>
      </form>
    </DoorCard>
  );
}
