import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import type { ReactNode } from 'react';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import type { Role } from '#contracts/common.ts';
import type { Me } from '#contracts/session.ts';
import { formatsFor } from '#src/lib/formats.ts';
import { meQuery, ShopContext } from '#src/lib/session.ts';
import { Overlays } from '#src/app/overlays.tsx';

export const shopId = '018f3a00-0000-7000-8000-000000000001';

/** An invented account in one invented shop. */
export const meAs = (role: Role, more: Partial<Me> = {}): Me => ({
  account: {
    id: '018f3a00-0000-7000-8000-0000000000a1',
    email: 'imke@saltmarsh.example',
    name: 'Imke Tiedemann',
    temperatureUnit: 'C',
    clock: '24',
  },
  shops: [{ id: shopId, name: 'Saltmarsh Coachworks', timeZone: 'Europe/Berlin', role, personId: null }],
  serverTime: '2026-03-12T08:31:00.000Z',
  localMailbox: false,
  ...more,
});

type Options = {
  me?: Me | null;
  /** Address shown, and the route's pattern where the page reads params. */
  at?: string;
  pattern?: string;
  /** Other routes, to see where a page leads. */
  others?: { path: string; element: ReactNode }[];
  /** What "today" and "now" mean in what is written; the real clock where absent. */
  now?: () => number;
};

/** Renders a page as the app would: router, queries, toasts, and, where somebody is signed in, a shop. */
export function renderPage(page: ReactNode, { me = meAs('lead'), at = '/', pattern, others = [], now }: Options = {}) {
  const client = new QueryClient({
    defaultOptions: { queries: { retry: false, networkMode: 'always' }, mutations: { networkMode: 'always' } },
  });
  client.setQueryData(meQuery.queryKey, me);
  const shop = me?.shops[0];
  const { clock, temperatureUnit: unit } = me?.account ?? { clock: '24', temperatureUnit: 'C' };
  const element = shop ? (
    <ShopContext
      value={{ shop, formats: formatsFor({ zone: shop.timeZone, clock, unit }, now), choose: () => undefined }}
    >
      {page}
    </ShopContext>
  ) : (
    page
  );
  const router = createMemoryRouter([{ path: pattern ?? new URL(at, 'http://here').pathname, element }, ...others], {
    initialEntries: [at],
  });
  const view = render(
    <QueryClientProvider client={client}>
      <Overlays>
        <RouterProvider router={router} />
      </Overlays>
    </QueryClientProvider>,
  );
  return { ...view, router, client };
}
