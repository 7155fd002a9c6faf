import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { Link, Navigate, useSearchParams } from 'react-router-dom';
import { signIn } from '#contracts/session.ts';
import { ownPlace, paths } from '#src/app/paths.ts';
import { call } from '#src/lib/api.ts';
import { meQuery, useMaybeMe } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { PasswordField, TextField } from '#src/ui/text-field.tsx';
import { isEmail } from './checks.ts';
import { DoorCard } from './door-card.tsx';
import { signUpQuery } from './sign-up-query.ts';

/** Leads back to where one wanted to go. */
export function Component() {
  const [search] = useSearchParams();
  const client = useQueryClient();
  const me = useMaybeMe();
  const signUp = useQuery(signUpQuery);
  const { register, handleSubmit, formState } = useForm({ defaultValues: { email: '', password: '' } });
  const enter = useMutation({
    mutationFn: (typed: { email: string; password: string }) =>
      call(signIn, { body: { email: typed.email.trim(), password: typed.password } }),
    onSuccess: (signedIn) => {
      // What was fetched for whoever was here before is not shown to somebody else.
      client.removeQueries();
      client.setQueryData(meQuery.queryKey, signedIn);
    },
  });
  const signedIn = enter.data ?? me;
  const to = search.get('to');
  if (signedIn) return <Navigate to={ownPlace(to)} replace />;
  const { errors } = formState;
  return (
    <DoorCard title="Sign in" about={to ? 'Sign in to go on to the page you asked for.' : undefined}>
      <form
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => void handleSubmit((typed) => enter.mutate(typed))(event)}
      >
        <TextField
          label="E-mail"
          type="email"
          autoComplete="username"
          autoFocus
          error={errors.email?.message}
          {...register('email', { validate: isEmail })}
        />
        <PasswordField
          label="Password"
          autoComplete="current-password"
          error={errors.password?.message}
          {...register('password', { required: 'Enter your password.' })}
        />
        {enter.isError && <ErrorNote error={enter.error} />}
        <Button type="submit" look="primary" busy={enter.isPending}>
          Sign in
        </Button>
      </form>
      <Link to={paths.forgotten()} className="link self-start">
        Forgotten your password?
      </Link>
      {signUp.data?.open && (
        <Link to={paths.signUp()} className="link self-start">
          Open a shop of your own
        </Link>
      )}
    </DoorCard>
  );
}
