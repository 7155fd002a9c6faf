import { useMutation, useQueryClient } from '@tanstack/react-query';
import { role as roleSchema } from '#contracts/common.ts';
import type { BodyOf } from '#contracts/endpoint.ts';
import { changeMember, type Member } from '#contracts/session.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { roleWord } from '#src/lib/role-words.ts';
import { useMe, useShop } from '#src/lib/session.ts';
import { Badge } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Select } from '#src/ui/select.tsx';
import { Td } from '#src/ui/table.tsx';

/** Role and access can be changed back at any time, so nothing asks. One's own stay: nobody locks the door on oneself. */
export function MemberRow({ member }: { member: Member }) {
  const shop = useShop();
  const isMe = useMe().account.id === member.accountId;
  const client = useQueryClient();
  const change = useMutation({
    mutationFn: (body: BodyOf<typeof changeMember>) =>
      call(changeMember, { params: { shopId: shop.id, memberId: member.id }, body }),
    onSettled: () => client.invalidateQueries({ queryKey: shopKey(shop.id, 'members') }),
  });
  const shown = { ...member, ...(change.isPending ? change.variables : {}) };
  return (
    <>
      <tr className={shown.disabled ? 'text-muted' : undefined}>
        <Td>
          <span className="font-semibold">{member.name}</span>
          <span className="block text-xs wrap-anywhere text-muted">{member.email}</span>
        </Td>
        <Td>
          {isMe ? (
            <>{roleWord[member.role]} (you)</>
          ) : (
            <Select
              label={`Role of ${member.name}`}
              hideLabel
              className="w-32"
              value={shown.role}
              disabled={change.isPending || shown.disabled}
              onChange={(event) => change.mutate({ role: roleSchema.parse(event.target.value) })}
            >
              {roleSchema.options.map((role) => (
                <option key={role} value={role}>
                  {roleWord[role]}
                </option>
              ))}
            </Select>
          )}
        </Td>
        <Td className="text-right whitespace-nowrap">
          {shown.disabled && <Badge tone="amber">may not sign in</Badge>}
          {!isMe && (
            <Button
              size="small"
              look="quiet"
              className="ml-2"
              busy={change.isPending}
              onClick={() => change.mutate({ disabled: !member.disabled })}
            >
              {member.disabled ? 'Let in again' : 'Lock out'}
              <span className="sr-only"> {member.name}</span>
            </Button>
          )}
        </Td>
      </tr>
      {change.isError && (
        <tr>
          <Td colSpan={3}>
            <ErrorNote error={change.error} what={`${member.name} stays as before.`} />
          </Td>
        </tr>
      )}
    </>
  );
}
