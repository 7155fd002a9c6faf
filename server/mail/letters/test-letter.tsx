/** @jsxRuntime automatic */
import { Text } from '@react-email/components';
import type { Letter } from '../mailer.ts';
import { paragraph, write } from './layout.tsx';

export type TestLetter = { name: string; shopName: string; link: string };

/** Says that letters of this shop arrive. */
export const testLetter = ({ name, shopName, link }: TestLetter): Promise<Letter> =>
  write(`Letters of ${shopName} arrive`, {
    preview: 'A letter to try the mail.',
    title: 'Letters arrive',
    action: { label: 'Open the settings', href: link },
    why: 'You get this because you asked for a test letter in the settings of the shop.',
    children: (
      <Text style={paragraph}>
        Hello {name}, this letter was sent to try the mail of {shopName}. That you read it means that letters about
        plans reach your painters the same way.
      </Text>
    ),
  });
