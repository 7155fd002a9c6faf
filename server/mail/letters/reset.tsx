/** @jsxRuntime automatic */
import { Text } from '@react-email/components';
import type { Letter } from '../mailer.ts';
import { paragraph, small, write } from './layout.tsx';

export type ResetLetter = { name: string; link: string; goodForMinutes: number };

export const resetLetter = ({ name, link, goodForMinutes }: ResetLetter): Promise<Letter> =>
  write('Choose a new password', {
    preview: `The link is good for ${goodForMinutes} minutes.`,
    title: 'Choose a new password',
    action: { label: 'Choose a new password', href: link },
    why: 'You get this because someone asked for a new password for this address on the sign-in page.',
    children: (
      <>
        <Text style={paragraph}>
          Hello {name}, the link below lets you choose a new password. It is good for {goodForMinutes} minutes and works
          once.
        </Text>
        <Text style={small}>If that was not you, leave it be: your password stays as it is.</Text>
      </>
    ),
  });
