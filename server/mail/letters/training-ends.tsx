/** @jsxRuntime automatic */
import { Text } from '@react-email/components';
import type { Letter } from '../mailer.ts';
import { paragraph, small, write } from './layout.tsx';

export type TrainingEndsLetter = {
  name: string;
  shopName: string;
  personName: string;
  /** The last day on which the training is good, as a day of the calendar. */
  goodThrough: string;
  link: string;
};

const sayDay = (day: string): string =>
  new Intl.DateTimeFormat('en-GB', { weekday: 'long', day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' })
    .format(new Date(`${day}T12:00:00Z`))
    .replace(',', '');

export const trainingEndsLetter = (given: TrainingEndsLetter): Promise<Letter> =>
  write(`Spray training of ${given.personName} ends on ${sayDay(given.goodThrough)}`, {
    preview: `Time to book the refresher.`,
    title: `Spray training of ${given.personName}`,
    action: { label: 'Open the people of the shop', href: given.link },
    why: `You get this because you run or plan ${given.shopName}. It is sent once for each training that ends.`,
    children: (
      <>
        <Text style={paragraph}>
          Hello {given.name}, the spray training of {given.personName} at {given.shopName} is good through{' '}
          {sayDay(given.goodThrough)}. After that day no plan gives them spray work, unless the shop only warns of it.
        </Text>
        <Text style={paragraph}>Enter the new date once the refresher is done.</Text>
        <Text style={small}>
          Reckoned as five years from the day entered (40 CFR 63.11173). Your local rules and the people responsible for
          them come first.
        </Text>
      </>
    ),
  });
