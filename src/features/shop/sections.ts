import type { Role } from '#contracts/common.ts';
import { may } from '#src/lib/session.ts';

export type Section = { to: string; label: string; seen: (role: Role) => boolean };
type Group = { title: string; sections: Section[] };

/** The set-up in the order in which a shop thinks of it. A new page is one line here and one in the router. */
export const groups: Group[] = [
  {
    title: 'The shop',
    sections: [
      { to: '/shop', label: 'First steps', seen: may.setUp },
      { to: '/shop/settings', label: 'Shop', seen: may.plan },
      { to: '/shop/places', label: 'Booths and stations', seen: () => true },
      { to: '/shop/lamps', label: 'Lamps and circuits', seen: () => true },
      { to: '/shop/hours', label: 'Hours and closures', seen: () => true },
      { to: '/shop/air', label: 'Air', seen: () => true },
      { to: '/shop/upkeep', label: 'Upkeep', seen: () => true },
    ],
  },
  {
    title: 'How work is done',
    sections: [
      { to: '/shop/coatings', label: 'Data sheets', seen: () => true },
      { to: '/shop/sheets', label: 'Process sheets', seen: () => true },
    ],
  },
  {
    title: 'Who works here',
    sections: [{ to: '/shop/people', label: 'People', seen: may.plan }],
  },
  {
    title: 'Who signs in',
    sections: [
      { to: '/shop/members', label: 'Members', seen: may.setUp },
      { to: '/shop/letters', label: 'Letters sent', seen: may.setUp },
      { to: '/shop/keys', label: 'API keys', seen: may.setUp },
    ],
  },
];
