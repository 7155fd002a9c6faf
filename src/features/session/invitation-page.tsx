import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { Link, useNavigate } from 'react-router-dom';
import type { ReplyOf } from '#contracts/endpoint.ts';
import { acceptInvitation, readInvitation } from '#contracts/session.ts';
import { paths } from '#src/app/paths.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { call } from '#src/lib/api.ts';
import { roleWord } from '#src/lib/role-words.ts';
import { meQuery } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { PasswordField, TextField } from '#src/ui/text-field.tsx';
import { isNewPassword, newPasswordHint } from './checks.ts';
import { DoorCard } from './door-card.tsx';
import { NoToken } from './no-token.tsx';
import { useLinkToken } from './use-link-token.ts';

export function Component() {
  const token = useLinkToken();
  return token === null ? <NoToken title="Invitation" /> : <Invitation token={token} />;
}

function Invitation({ token }: { token: string }) {
  const invitation = useQuery({
    queryKey: ['invitation', token],
    queryFn: ({ signal }) => call(readInvitation, { body: { token }, signal }),
    staleTime: Infinity,
    gcTime: 0,
  });
  if (invitation.isPending)
    return (
      <DoorCard title="Invitation">
        <SkeletonLines lines={5} label="Looking at the invitation" />
      </DoorCard>
    );
  if (invitation.isError) return <Unreadable error={invitation.error} retry={() => void invitation.refetch()} />;
  return <Accept token={token} invitation={invitation.data} />;
}

function Unreadable({ error, retry }: { error: Error; retry: () => void }) {
  const isGone = isApiError(error, 'gone');
  return (
    <DoorCard title="Invitation">
      <ErrorNote error={error} {...(isGone ? {} : { retry })} />
      {isGone && <p>If you accepted it before, just sign in. Else ask for another invitation in your shop.</p>}
      <Button asChild className="self-start">
        <Link to={paths.signIn()}>Go to sign-in</Link>
      </Button>
    </DoorCard>
  );
}

type Typed = { name: string; password: string };

function Accept({ token, invitation }: { token: string; invitation: ReplyOf<typeof readInvitation> }) {
  const { shopName, email, role, hasAccount } = invitation;
  const client = useQueryClient();
  const navigate = useNavigate();
  const { register, handleSubmit, formState } = useForm<Typed>({ defaultValues: { name: '', password: '' } });
  const accept = useMutation({
    // An account that exists keeps its name; the interface wants one all the same.
    mutationFn: ({ name, password }: Typed) =>
      call(acceptInvitation, { body: { token, name: hasAccount ? email.slice(0, 120) : name.trim(), password } }),
    onSuccess: (me) => {
      client.removeQueries();
      client.setQueryData(meQuery.queryKey, me);
      void navigate(paths.home(), { replace: true });
    },
  });
  const { errors } = formState;
  const about = (
    <>
      You are invited as <b className="text-ink">{roleWord[role]}</b>, with the address{' '}
      <b className="wrap-anywhere text-ink">{email}</b>.
    </>
  );
  return (
    <DoorCard title={`Join ${shopName}`} about={about}>
      <form
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => void handleSubmit((typed) => accept.mutate(typed))(event)}
      >
        {/* For password managers, which keep a password with its address. */}
        <input type="hidden" autoComplete="username" value={email} readOnly />
        {!hasAccount && (
          <TextField
            label="Your name"
            hint="As the others in the shop know you."
            autoComplete="name"
            autoFocus
            maxLength={120}
            error={errors.name?.message}
            {...register('name', { validate: (text) => text.trim() !== '' || 'Enter your name.' })}
          />
        )}
        {hasAccount ? (
          <PasswordField
            label="Password"
            hint="This address has an account already: the password it has."
            autoComplete="current-password"
            autoFocus
            error={errors.password?.message}
            {...register('password', { required: 'Enter your password.' })}
          />
        ) : (
          <PasswordField
            label="Choose a password"
            hint={newPasswordHint}
            autoComplete="new-password"
            error={errors.password?.message}
            {...register('password', { validate: isNewPassword })}
          />
        )}
        {accept.isError && (
          <ErrorNote error={accept.error}>
            {isApiError(accept.error, 'wrong-credentials') && (
              <Link to={paths.forgotten()} className="link">
                Forgotten your password?
              </Link>
            )}
          </ErrorNote>
        )}
        <Button type="submit" look="primary" busy={accept.isPending}>
          Join
        </Button>
      </form>
    </DoorCard>
  );
}
