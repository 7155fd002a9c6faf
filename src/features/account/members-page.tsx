import { useQuery } from '@tanstack/react-query';
import { UserPlus } from 'lucide-react';
import { useState } from 'react';
import type { ReplyOf } from '#contracts/endpoint.ts';
import { listMembers } from '#contracts/session.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { roleWord } from '#src/lib/role-words.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { Table, Td, Th } from '#src/ui/table.tsx';
import { InviteDialog } from './invite-dialog.tsx';
import { MemberRow } from './member-row.tsx';
import { NotYours } from './not-yours.tsx';

export function Component() {
  const shop = useShop();
  return may.setUp(shop.role) ? <Members /> : <NotYours title="Members" />;
}

function Members() {
  const shop = useShop();
  const [isInviting, setInviting] = useState(false);
  const members = useQuery({
    queryKey: shopKey(shop.id, 'members'),
    queryFn: ({ signal }) => call(listMembers, { params: { shopId: shop.id }, signal }),
  });
  return (
    <Page
      title="Members"
      about={shop.name}
      actions={
        <Button look="primary" icon={<UserPlus size={16} aria-hidden="true" />} onClick={() => setInviting(true)}>
          Invite
        </Button>
      }
    >
      {members.isPending && <SkeletonLines lines={6} label="Loading the members" />}
      {members.isError && (
        <ErrorNote error={members.error} what="The members could not be loaded." retry={() => void members.refetch()} />
      )}
      {members.data && <Lists {...members.data} />}
      <InviteDialog open={isInviting} onOpenChange={setInviting} />
    </Page>
  );
}

function Lists({ members, invitations }: ReplyOf<typeof listMembers>) {
  const { dateTime } = useFormats();
  return (
    <>
      <Table label="Members">
        <thead>
          <tr>
            <Th>Name</Th>
            <Th>Role</Th>
            <Th>
              <span className="sr-only">May sign in</span>
            </Th>
          </tr>
        </thead>
        <tbody>
          {members.map((member) => (
            <MemberRow key={member.id} member={member} />
          ))}
        </tbody>
      </Table>
      {invitations.length > 0 && (
        <section className="flex flex-col gap-3">
          <h2>Invited, not yet here</h2>
          <Table label="Open invitations">
            <thead>
              <tr>
                <Th>E-mail</Th>
                <Th>Role</Th>
                <Th>Link works until</Th>
              </tr>
            </thead>
            <tbody>
              {invitations.map(({ id, email, role, expiresAt }) => (
                <tr key={id}>
                  <Td>{email}</Td>
                  <Td>{roleWord[role]}</Td>
                  <Td className="whitespace-nowrap">
                    <time dateTime={expiresAt}>{dateTime(expiresAt)}</time>
                  </Td>
                </tr>
              ))}
            </tbody>
          </Table>
        </section>
      )}
    </>
  );
}
