/** @jsxRuntime automatic */
import { Text } from '@react-email/components';
import type { Role } from '#contracts/common.ts';
import type { Letter } from '../mailer.ts';
import { paragraph, small, write } from './layout.tsx';

export type InvitationLetter = { shopName: string; role: Role; link: string; goodForDays: number };

const deeds: Record<Role, string> = {
  owner: 'run the shop and see how its booths are used',
  lead: 'plan the booth day',
  painter: 'see what is yours today, with its flash and bake clocks',
  office: 'take jobs in and see where each one stands',
};

export const invitationLetter = ({ shopName, role, link, goodForDays }: InvitationLetter): Promise<Letter> =>
  write(`${shopName} invites you to Ovenbird`, {
    preview: `Join ${shopName} as ${role}.`,
    title: `Join ${shopName}`,
    action: { label: 'Accept the invitation', href: link },
    why: `You get this because ${shopName} entered this address. If you do not know them, leave it be.`,
    children: (
      <>
        <Text style={paragraph}>
          {shopName} plans its paint work with Ovenbird and invites you as {role}: you can {deeds[role]}.
        </Text>
        <Text style={small}>The link is good for {goodForDays} days and works once.</Text>
      </>
    ),
  });
