/** @jsxRuntime automatic */
import { Text } from '@react-email/components';
import type { Letter } from '../mailer.ts';
import { paragraph, small, write } from './layout.tsx';

const why = 'You get this because someone entered this address to open a shop. If that was not you, leave it be.';

export const signUpLetter = ({ link }: { link: string }): Promise<Letter> =>
  write('Open your shop in Ovenbird', {
    preview: 'One more step: a name, a password, and the shop.',
    title: 'Open your shop',
    action: { label: 'Open the shop', href: link },
    why,
    children: (
      <>
        <Text style={paragraph}>
          The link below opens an empty shop for this address, and leads you to its first plan in five steps.
        </Text>
        <Text style={small}>It is good for a day and works once.</Text>
      </>
    ),
  });

/** To an address that has an account: on the page both are the same, only here is it said. */
export const hasAccountLetter = ({ name, link }: { name: string; link: string }): Promise<Letter> =>
  write('You have an account in Ovenbird', {
    preview: 'Sign in, and open another shop from there.',
    title: 'You have an account already',
    action: { label: 'Sign in', href: link },
    why,
    children: (
      <Text style={paragraph}>
        Hello {name}, this address has an account already. Sign in and open another shop from the set-up; if you have
        forgotten the password, a new one can be asked for there.
      </Text>
    ),
  });
