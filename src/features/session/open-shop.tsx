import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Link, useNavigate } from 'react-router-dom';
import { v7 } from 'uuid';
import { timeZone } from '#contracts/shops.ts';
import { readSignUpLink, signUp } from '#contracts/sign-up.ts';
import { paths } from '#src/app/paths.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { call } from '#src/lib/api.ts';
import { meQuery, rememberShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { PasswordField, TextField } from '#src/ui/text-field.tsx';
import { isNewPassword, newPasswordHint } from './checks.ts';
import { DoorCard } from './door-card.tsx';

const title = 'Open your shop';

export function OpenShop({ token }: { token: string }) {
  const link = useQuery({
    queryKey: ['sign-up', token],
    queryFn: ({ signal }) => call(readSignUpLink, { body: { token }, signal }),
    staleTime: Infinity,
    gcTime: 0,
  });
  if (link.isPending)
    return (
      <DoorCard title={title}>
        <SkeletonLines lines={5} label="Looking at the link" />
      </DoorCard>
    );
  if (link.isError)
    return (
      <DoorCard title={title}>
        <ErrorNote
          error={link.error}
          {...(isApiError(link.error, 'gone') ? {} : { retry: () => void link.refetch() })}
        />
        <Button asChild className="self-start">
          <Link to={paths.signIn()}>Go to sign-in</Link>
        </Button>
      </DoorCard>
    );
  return <Fill token={token} email={link.data.email} />;
}

const zoneHere = () => Intl.DateTimeFormat().resolvedOptions().timeZone;

function Fill({ token, email }: { token: string; email: string }) {
  const client = useQueryClient();
  const navigate = useNavigate();
  const [id] = useState(() => v7());
  const { register, handleSubmit, formState } = useForm({
    defaultValues: { name: '', password: '', shop: '', timeZone: zoneHere() },
  });
  type Typed = { name: string; password: string; shop: string; timeZone: string };
  const open = useMutation({
    mutationFn: ({ name, password, shop, timeZone }: Typed) =>
      call(signUp, { body: { token, name: name.trim(), password, shop: { id, name: shop.trim(), timeZone } } }),
    onSuccess: (me) => {
      client.removeQueries();
      rememberShop(id);
      client.setQueryData(meQuery.queryKey, me);
      void navigate(paths.firstSteps(), { replace: true });
    },
  });
  const { errors } = formState;
  return (
    <DoorCard title={title} about={<span className="wrap-anywhere">For {email}.</span>}>
      <form
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => void handleSubmit((typed) => open.mutate(typed))(event)}
      >
        <input type="hidden" autoComplete="username" value={email} readOnly />
        <TextField
          label="Your name"
          autoComplete="name"
          maxLength={120}
          error={errors.name?.message}
          {...register('name', { validate: (text) => text.trim() !== '' || 'Enter your name.' })}
        />
        <PasswordField
          label="Choose a password"
          hint={newPasswordHint}
          autoComplete="new-password"
          error={errors.password?.message}
          {...register('password', { validate: isNewPassword })}
        />
        <TextField
          label="Name of the shop"
          autoComplete="organization"
          maxLength={120}
          error={errors.shop?.message}
          {...register('shop', { validate: (text) => text.trim() !== '' || 'Give the shop a name.' })}
        />
        <TextField
          label="Time zone of the shop"
          hint="Such as Europe/Amsterdam."
          autoComplete="off"
          error={errors.timeZone?.message}
          {...register('timeZone', {
            validate: (text) => timeZone.safeParse(text).success || 'This is no time zone, such as Europe/Amsterdam.',
          })}
        />
        {open.isError && <ErrorNote error={open.error} />}
        <Button type="submit" look="primary" busy={open.isPending}>
          Open the shop
        </Button>
      </form>
    </DoorCard>
  );
}
