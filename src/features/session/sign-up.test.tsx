import { screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, expect, it, vi } from 'vitest';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage } from '#src/testing/render-page.tsx';
import { Component as SignUp } from './sign-up-page.tsx';

afterEach(() => vi.unstubAllGlobals());
const token = 'a-token-of-more-than-twenty-characters';
const open = { 'GET /api/sign-up': { body: { open: true } } };
const others = [{ path: '/shop', element: <p>First steps page</p> }];
const show = (at: string) => renderPage(<SignUp />, { me: null, at, others });

it('asks for an address and says where the letter went', async () => {
  const { sent } = fakeApi({ ...open, 'POST /api/sign-up': {} });
  const { container } = show('/sign-up');
  const user = userEvent.setup();
  await user.type(await screen.findByLabelText('E-mail'), ' kaye@harbourlane.example {Enter}');
  expect(await screen.findByRole('status')).toHaveTextContent('kaye@harbourlane.example');
  expect(sent.at(-1)?.body).toEqual({ email: 'kaye@harbourlane.example' });
  await expectAccessible(container);
});

it('says so where shops are not opened by everybody', async () => {
  fakeApi({ 'GET /api/sign-up': { body: { open: false } } });
  show('/sign-up');
  expect(await screen.findByText(/not opened here by everybody/)).toBeInTheDocument();
  expect(screen.queryByLabelText('E-mail')).toBeNull();
});

it('opens the shop from the link and leads to its first steps', async () => {
  const { sent } = fakeApi({
    ...open,
    'POST /api/sign-up/read': { body: { email: 'kaye@harbourlane.example' } },
    'POST /api/sign-up/use': { body: meAs('owner') },
  });
  show(`/sign-up#${token}`);
  const user = userEvent.setup();
  await user.type(await screen.findByLabelText('Your name'), 'Kaye');
  await user.type(screen.getByLabelText('Choose a password'), 'a long and quiet one');
  await user.type(screen.getByLabelText('Name of the shop'), 'Harbour Lane');
  const zone = screen.getByLabelText('Time zone of the shop');
  await user.clear(zone);
  await user.type(zone, 'Nowhere/Else{Enter}');
  expect(await screen.findByText(/This is no time zone/)).toBeInTheDocument();
  await user.clear(zone);
  await user.type(zone, 'Europe/Lisbon{Enter}');
  expect(await screen.findByText('First steps page')).toBeInTheDocument();
  expect(sent.at(-1)?.body).toMatchObject({
    token,
    name: 'Kaye',
    shop: { name: 'Harbour Lane', timeZone: 'Europe/Lisbon' },
  });
});

it('says that a link was used or is too old', async () => {
  fakeApi({ ...open, 'POST /api/sign-up/read': apiError(410, 'gone') });
  show(`/sign-up#${token}`);
  expect(await screen.findByRole('alert')).toBeInTheDocument();
  expect(screen.getByRole('link', { name: 'Go to sign-in' })).toBeInTheDocument();
});
