import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useId } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { role as roleSchema, type Role } from '#contracts/common.ts';
import { readDay } from '#contracts/day.ts';
import { email, invite } from '#contracts/session.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { roleWord } from '#src/lib/role-words.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';

const may: Record<Role, string> = {
  owner: 'Everything, also members and what the shop has.',
  lead: 'Plans the booth day and posts it.',
  painter: 'Works the own bench, sees the booth day.',
  office: 'Takes jobs in, reads dates.',
};

type Typed = { email: string; role: Role; personId: string };
const empty: Typed = { email: '', role: 'painter', personId: '' };
type InviteDialogProps = { open: boolean; onOpenChange: (open: boolean) => void };

export function InviteDialog({ open, onOpenChange }: InviteDialogProps) {
  const shop = useShop();
  const client = useQueryClient();
  const formId = useId();
  const people = usePeople(open);
  const { register, handleSubmit, formState, reset, control } = useForm<Typed>({ defaultValues: empty });
  const role = useWatch({ control, name: 'role' });
  const send = useMutation({
    mutationFn: ({ email, role, personId }: Typed) =>
      call(invite, {
        params: { shopId: shop.id },
        body: { email: email.trim(), role, personId: personId === '' ? null : personId },
      }),
    onSuccess: (_reply, typed) => {
      void client.invalidateQueries({ queryKey: shopKey(shop.id, 'members') });
      showToast(`A letter is on its way to ${typed.email.trim()}`, { tone: 'good' });
      reset(empty);
      onOpenChange(false);
    },
  });
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title="Invite into the shop"
      about="A letter with a link brings them in. It works for seven days and once."
      actions={
        <>
          <Button onClick={() => onOpenChange(false)}>Not now</Button>
          <Button type="submit" form={formId} look="primary" busy={send.isPending}>
            Send the letter
          </Button>
        </>
      }
    >
      <form
        id={formId}
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => void handleSubmit((typed) => send.mutate(typed))(event)}
      >
        <TextField
          label="E-mail"
          type="email"
          autoComplete="off"
          error={formState.errors.email?.message}
          {...register('email', {
            validate: (text) => email.safeParse(text.trim()).success || 'Enter an e-mail address.',
          })}
        />
        <Select label="Role" hint={may[role]} {...register('role')}>
          {roleSchema.options.map((role) => (
            <option key={role} value={role}>
              {roleWord[role]}
            </option>
          ))}
        </Select>
        <Select
          label="Works as"
          optional
          hint="Somebody of the roster, so that the bench shows their work."
          disabled={people.length === 0}
          {...register('personId')}
        >
          <option value="">nobody of the roster</option>
          {people.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </Select>
        {send.isError &&
          (isApiError(send.error, 'taken') ? (
            <ErrorNote error={send.error} what="This address is a member already." />
          ) : (
            <ErrorNote error={send.error} what="No letter was sent." />
          ))}
      </form>
    </Dialog>
  );
}

/** The roster, as the booth day shows it. */
function usePeople(wanted: boolean) {
  const shop = useShop();
  const { data } = useQuery({
    queryKey: shopKey(shop.id, 'day', 'roster'),
    queryFn: ({ signal }) => {
      const now = Date.now();
      const query = { from: new Date(now).toISOString(), to: new Date(now + 3_600_000).toISOString() };
      return call(readDay, { params: { shopId: shop.id }, query, signal });
    },
    enabled: wanted,
    staleTime: 300_000,
  });
  return data?.rows.filter((row) => row.kind === 'person') ?? [];
}
