import { useMutation, useQuery } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { Link } from 'react-router-dom';
import { askToSignUp } from '#contracts/sign-up.ts';
import { paths } from '#src/app/paths.ts';
import { call } from '#src/lib/api.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { isEmail } from './checks.ts';
import { DoorCard } from './door-card.tsx';
import { signUpQuery } from './sign-up-query.ts';
import { useLinkToken } from './use-link-token.ts';
import { OpenShop } from './open-shop.tsx';

/** Asks for the address; the link of the letter leads back here with its token. */
export function Component() {
  const token = useLinkToken();
  const signUp = useQuery(signUpQuery);
  if (token !== null) return <OpenShop token={token} />;
  if (signUp.isPending)
    return (
      <DoorCard title="Open a shop">
        <SkeletonLines lines={3} label="Looking whether shops can be opened here" />
      </DoorCard>
    );
  if (signUp.isError || !signUp.data.open) return <Closed />;
  return <Ask />;
}

const Closed = () => (
  <DoorCard title="Open a shop">
    <p>Shops are not opened here by everybody. Ask whoever looks after this server, or an owner who can invite you.</p>
    <Button asChild className="self-start">
      <Link to={paths.signIn()}>Go to sign-in</Link>
    </Button>
  </DoorCard>
);

function Ask() {
  const { register, handleSubmit, formState } = useForm({ defaultValues: { email: '' } });
  const ask = useMutation({
    mutationFn: (typed: { email: string }) => call(askToSignUp, { body: { email: typed.email.trim() } }),
  });
  if (ask.isSuccess)
    return (
      <DoorCard title="Look into your mail">
        <p role="status">
          A letter is on its way to <b className="wrap-anywhere">{ask.variables.email.trim()}</b>. Its link opens the
          shop; it is good for a day and works once.
        </p>
        <div className="flex flex-wrap gap-2">
          <Button onClick={() => ask.reset()}>Nothing came: ask again</Button>
          <Button asChild look="quiet">
            <Link to={paths.mailbox()}>Letters kept on this machine</Link>
          </Button>
        </div>
      </DoorCard>
    );
  return (
    <DoorCard
      title="Open a shop"
      about="A letter with a link shows that the address is yours; the rest takes a minute."
    >
      <form
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => void handleSubmit((typed) => ask.mutate(typed))(event)}
      >
        <TextField
          label="E-mail"
          type="email"
          autoComplete="username"
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
