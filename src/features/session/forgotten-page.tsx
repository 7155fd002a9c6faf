import { useMutation, useQuery } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { Link } from 'react-router-dom';
import { listMailbox } from '#contracts/mailbox.ts';
import { askForReset } from '#contracts/session.ts';
import { paths } from '#src/app/paths.ts';
import { call } from '#src/lib/api.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { isEmail } from './checks.ts';
import { DoorCard } from './door-card.tsx';

export function Component() {
  const { register, handleSubmit, formState } = useForm({ defaultValues: { email: '' } });
  const ask = useMutation({
    mutationFn: (typed: { email: string }) => call(askForReset, { body: { email: typed.email.trim() } }),
  });
  if (ask.isSuccess) return <Asked email={ask.variables.email.trim()} again={() => ask.reset()} />;
  return (
    <DoorCard title="Forgotten password" about="A letter with a link brings you to a new one.">
      <form
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => void handleSubmit((typed) => ask.mutate(typed))(event)}
      >
        <TextField
          label="E-mail"
          type="email"
          autoComplete="username"
          autoFocus
          error={formState.errors.email?.message}
          {...register('email', { validate: isEmail })}
        />
        {ask.isError && <ErrorNote error={ask.error} />}
        <Button type="submit" look="primary" busy={ask.isPending}>
          Send the letter
        </Button>
      </form>
      <Link to={paths.signIn()} className="link self-start">
        Back to sign-in
      </Link>
    </DoorCard>
  );
}

/** Says the same whether the account exists or not. */
function Asked({ email, again }: { email: string; again: () => void }) {
  const mailbox = useQuery({
    queryKey: ['mailbox'],
    queryFn: ({ signal }) => call(listMailbox, { signal }),
    retry: false,
  });
  return (
    <DoorCard title="Look into your mail">
      <p role="status">
        If there is an account for <b className="wrap-anywhere">{email}</b>, a letter is on its way to it. Its link
        works for a short time and once.
      </p>
      {mailbox.isSuccess && (
        <p>
          Letters are kept on this machine:{' '}
          <Link to={paths.mailbox()} className="link">
            open the local mailbox
          </Link>
          .
        </p>
      )}
      <div className="flex flex-wrap gap-2">
        <Button onClick={again}>Nothing came: ask again</Button>
        <Button asChild look="quiet">
          <Link to={paths.signIn()}>Back to sign-in</Link>
        </Button>
      </div>
    </DoorCard>
  );
}
