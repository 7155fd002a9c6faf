import { QueryClientProvider, type QueryClient } from '@tanstack/react-query';
import { act, render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { makeQueryClient } from '#src/lib/query-client.ts';
import { meQuery } from '#src/lib/session.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { meAs, shopId } from '#src/testing/render-page.tsx';
import { routes } from './router.tsx';

beforeEach(() => {
  vi.stubGlobal(
    'EventSource',
    class extends EventTarget {
      close(): void {}
    },
  );
});
afterEach(() => vi.unstubAllGlobals());

function openApp(at: string, answers: Parameters<typeof fakeApi>[0]) {
  const { sent } = fakeApi(answers);
  const client: QueryClient = makeQueryClient(() => client.setQueryData(meQuery.queryKey, null));
  const router = createMemoryRouter(routes(client), { initialEntries: [at] });
  render(
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  return { client, router, sent };
}
const signedIn = (me = meAs('owner')) => ({ 'GET /api/session': { body: me } });

describe('the way in', () => {
  it('leads nobody to the sign-in, with the way back', async () => {
    const { router } = openApp('/account?x=1', { 'GET /api/session': apiError(401, 'not-signed-in') });
    expect(await screen.findByRole('heading', { name: 'Sign in' })).toBeInTheDocument();
    expect(router.state.location.search).toBe('?to=%2Faccount%3Fx%3D1');
  });
  it('says that the server is out of reach and is not taken for signed out', async () => {
    openApp('/account', { 'GET /api/session': apiError(404, 'not-found') });
    expect(await screen.findByRole('heading', { name: 'This page could not be shown' })).toBeInTheDocument();
  });
  it('leads to the sign-in when the session ends on the way', async () => {
    const { router } = openApp('/shop/members', {
      ...signedIn(),
      [`GET /api/shops/${shopId}/members`]: apiError(401, 'not-signed-in'),
    });
    expect(await screen.findByRole('heading', { name: 'Sign in' })).toBeInTheDocument();
    expect(router.state.location.search).toBe('?to=%2Fshop%2Fmembers');
  });
  it('knows members of no shop', async () => {
    openApp('/account', signedIn({ ...meAs('owner'), shops: [] }));
    expect(await screen.findByText('You belong to no shop')).toBeInTheDocument();
  });
});

describe('the shell', () => {
  it('shows a page that does not exist within itself', async () => {
    openApp('/nowhere', signedIn());
    expect(await screen.findByRole('heading', { name: 'There is nothing here' })).toBeInTheDocument();
    expect(screen.getAllByRole('link', { name: 'Booth day' })[0]).toHaveAttribute('href', '/day');
  });
  it('shows each role what it may use', async () => {
    openApp('/account', signedIn(meAs('office')));
    await screen.findByRole('heading', { name: 'Your account' });
    expect(screen.queryByRole('link', { name: 'Bench' })).not.toBeInTheDocument();
    expect(screen.queryByRole('link', { name: 'Booth use' })).not.toBeInTheDocument();
  });
  it('lists the keys on ?, but not while one types', async () => {
    openApp('/account', signedIn());
    const user = userEvent.setup();
    await user.type(await screen.findByLabelText('Your name'), '?');
    expect(screen.queryByRole('dialog')).not.toBeInTheDocument();
    act(() => (document.activeElement as HTMLElement).blur());
    await user.keyboard('?');
    expect(await screen.findByRole('dialog', { name: 'Keys' })).toBeInTheDocument();
  });
  it('keeps the shop for this tab and remembers it for the next', async () => {
    const me = meAs('owner');
    const second = { ...me.shops[0]!, id: '018f3a00-0000-7000-8000-000000000002', name: 'Second Yard' };
    openApp('/account', signedIn({ ...me, shops: [...me.shops, second] }));
    const user = userEvent.setup();
    await user.click(await screen.findByRole('button', { name: /Saltmarsh Coachworks/ }));
    await user.click(await screen.findByRole('menuitemradio', { name: 'Second Yard' }));
    expect(await screen.findByRole('button', { name: /Second Yard/ })).toBeInTheDocument();
    expect([sessionStorage, localStorage].map((kept) => kept.getItem('ovenbird.shop'))).toEqual([second.id, second.id]);
  });
  it('says that it has lost the network', async () => {
    openApp('/account', signedIn());
    await screen.findByRole('heading', { name: 'Your account' });
    const online = vi.spyOn(navigator, 'onLine', 'get').mockReturnValue(false);
    act(() => void window.dispatchEvent(new Event('offline')));
    expect(screen.getByText(/No connection. You see the shop as it was at/)).toBeInTheDocument();
    online.mockReturnValue(true);
    act(() => void window.dispatchEvent(new Event('online')));
    await waitFor(() => expect(screen.queryByText(/No connection/)).not.toBeInTheDocument());
  });
});
