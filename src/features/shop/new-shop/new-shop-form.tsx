import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { v7 } from 'uuid';
import { createShop } from '#contracts/shops.ts';
import { call } from '#src/lib/api.ts';
import { meQuery } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { readWith, useTypedForm } from '../parts/use-typed-form.ts';
import { ZoneField } from '../parts/zone-field.tsx';

type Form = { name: string; timeZone: string };

/** Opens an empty shop of which one is the owner. */
export function NewShopForm({ onOpened }: { onOpened: (shopId: string) => void }) {
  const client = useQueryClient();
  const [id] = useState(() => v7());
  const { form, change, faults, submit, drop } = useTypedForm<Form, Form & { id: string }>(
    'new-shop',
    { name: '', timeZone: Intl.DateTimeFormat().resolvedOptions().timeZone },
    (typed) => readWith<Form, typeof createShop.body>(createShop.body, { ...typed, id } as Form),
  );
  const open = useMutation({
    mutationFn: (body: Form & { id: string }) => call(createShop, { body }),
    onSuccess: (me) => {
      drop();
      // First, so that the shop is known when one goes there.
      client.setQueryData(meQuery.queryKey, me);
      onOpened(id);
    },
  });
  return (
    <form
      noValidate
      className="flex flex-col gap-4 text-left"
      onSubmit={(event) => {
        event.preventDefault();
        submit((value) => open.mutate(value));
      }}
    >
      <TextField
        label="Name of the shop"
        autoComplete="organization"
        value={form.name}
        error={faults.name === undefined ? undefined : 'Give it a name of at most 120 letters.'}
        onChange={(event) => change({ name: event.target.value })}
      />
      <ZoneField
        value={form.timeZone}
        error={faults.timeZone === undefined ? undefined : 'Choose a zone of the list, such as Europe/Amsterdam.'}
        onChange={(timeZone) => change({ timeZone })}
      />
      {open.isError && <ErrorNote error={open.error} what="No shop was opened." />}
      <Button type="submit" look="primary" busy={open.isPending} className="self-start">
        Open the shop
      </Button>
    </form>
  );
}
