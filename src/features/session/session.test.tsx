import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage } from '#src/testing/render-page.tsx';
import { Component as Forgotten } from './forgotten-page.tsx';
import { Component as Invitation } from './invitation-page.tsx';
import { Component as Reset } from './reset-page.tsx';
import { Component as SignIn } from './sign-in-page.tsx';

afterEach(() => vi.unstubAllGlobals());
const token = 'a-token-of-more-than-twenty-characters';
const others = [
  { path: '/', element: <p>Start page</p> },
  { path: '/jobs', element: <p>Jobs page</p> },
  { path: '/sign-in', element: <p>Sign-in page</p> },
];

describe('signing in', () => {
  const open = (at = '/sign-in') => renderPage(<SignIn />, { me: null, at, others });
  const fill = async (password = 'long enough it is') => {
    const user = userEvent.setup();
    await user.type(screen.getByLabelText('E-mail'), ' imke@saltmarsh.example ');
    await user.type(screen.getByLabelText('Password'), `${password}{Enter}`);
    return user;
  };

  it('leads back to where one wanted to go', async () => {
    const { sent } = fakeApi({ 'POST /api/session': { body: meAs('office') } });
    open('/sign-in?to=%2Fjobs%3Fq%3Ddoor');
    await fill();
    expect(await screen.findByText('Jobs page')).toBeInTheDocument();
    expect(sent.find(({ method }) => method === 'POST')?.body).toEqual({
      email: 'imke@saltmarsh.example',
      password: 'long enough it is',
    });
  });
  it('leads to no other site', async () => {
    fakeApi({ 'POST /api/session': { body: meAs('office') } });
    open('/sign-in?to=%2F%2Felsewhere.example');
    await fill();
    expect(await screen.findByText('Start page')).toBeInTheDocument();
  });
  it('says what is missing beside the fields and goes to the first', async () => {
    const { sent } = fakeApi({});
    open();
    await userEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    const email = screen.getByLabelText('E-mail');
    await waitFor(() => expect(email).toBeInvalid());
    expect(email).toHaveAccessibleDescription(/Enter an e-mail address/);
    expect(email).toHaveFocus();
    expect(screen.getByLabelText('Password')).toHaveAccessibleDescription('Enter your password.');
    expect(sent.filter(({ method }) => method === 'POST')).toEqual([]);
  });
  it('keeps what was typed when it is not right', async () => {
    fakeApi({ 'POST /api/session': apiError(401, 'wrong-credentials') });
    open();
    await fill();
    expect(await screen.findByRole('alert')).toHaveTextContent('E-mail or password is not right.');
    expect(screen.getByLabelText('Password')).toHaveValue('long enough it is');
  });
  it('says how long to wait after too many tries', async () => {
    fakeApi({ 'POST /api/session': { ...apiError(429, 'too-many'), headers: { 'retry-after': '600' } } });
    open();
    await fill();
    expect(await screen.findByRole('alert')).toHaveTextContent('Wait 10 minutes');
  });
  it('passes over to who is signed in already', async () => {
    renderPage(<SignIn />, { me: meAs('lead'), at: '/sign-in?to=%2Fjobs', others });
    expect(await screen.findByText('Jobs page')).toBeInTheDocument();
  });
  it('shows the password on demand, and is accessible', async () => {
    open();
    await expectAccessible();
    await userEvent.click(screen.getByRole('button', { name: 'Show what is typed' }));
    expect(screen.getByLabelText('Password')).toHaveAttribute('type', 'text');
  });
});

describe('a forgotten password', () => {
  it('is answered the same for every address, with the mailbox where letters stay here', async () => {
    fakeApi({ 'POST /api/password-reset': { status: 204 }, 'GET /api/mailbox': { body: { letters: [] } } });
    renderPage(<Forgotten />, { me: null, at: '/forgotten', others });
    await userEvent.type(screen.getByLabelText('E-mail'), 'nobody@saltmarsh.example{Enter}');
    expect(await screen.findByRole('status')).toHaveTextContent('If there is an account for nobody@saltmarsh.example');
    expect(await screen.findByRole('link', { name: 'open the local mailbox' })).toHaveAttribute('href', '/mailbox');
    await expectAccessible();
  });
});

describe('a new password by a letter’s link', () => {
  const open = (hash = `#${token}`) => renderPage(<Reset />, { me: null, at: `/password-reset${hash}`, others });
  it('takes the token out of the address and sends it in the body', async () => {
    const { sent } = fakeApi({ 'POST /api/password-reset/use': { status: 204 } });
    const { router } = open();
    await waitFor(() => expect(router.state.location.hash).toBe(''));
    await expectAccessible();
    await userEvent.type(screen.getByLabelText('New password'), 'quite a long one{Enter}');
    expect(await screen.findByRole('status')).toHaveTextContent('You were signed out everywhere');
    expect(sent[0]).toMatchObject({ path: '/api/password-reset/use', body: { token, password: 'quite a long one' } });
  });
  it('asks for ten characters before it sends anything', async () => {
    const { sent } = fakeApi({});
    open();
    await userEvent.type(screen.getByLabelText('New password'), 'too short{Enter}');
    await waitFor(() => expect(screen.getByLabelText('New password')).toBeInvalid());
    expect(sent).toEqual([]);
  });
  it('offers another letter where the link is spent', async () => {
    fakeApi({ 'POST /api/password-reset/use': apiError(410, 'gone') });
    open();
    await userEvent.type(screen.getByLabelText('New password'), 'quite a long one{Enter}');
    expect(await screen.findByRole('link', { name: 'Ask for a new letter' })).toHaveAttribute('href', '/forgotten');
  });
  it('explains itself without a token', async () => {
    open('');
    expect(screen.getByText(/needs the link from your letter/)).toBeInTheDocument();
    await expectAccessible();
  });
});

describe('an invitation', () => {
  const invitation = { shopName: 'Saltmarsh Coachworks', email: 'ada@saltmarsh.example', role: 'painter' };
  const open = () => renderPage(<Invitation />, { me: null, at: `/invitation#${token}`, others });
  it('makes an account and leads in', async () => {
    const { sent } = fakeApi({
      'POST /api/invitation/read': { body: { ...invitation, hasAccount: false } },
      'POST /api/invitation/accept': { body: meAs('painter') },
    });
    open();
    expect(await screen.findByRole('heading', { name: 'Join Saltmarsh Coachworks' })).toBeInTheDocument();
    await expectAccessible();
    await userEvent.type(screen.getByLabelText('Your name'), 'Ada');
    await userEvent.type(screen.getByLabelText('Choose a password'), 'quite a long one{Enter}');
    expect(await screen.findByText('Start page')).toBeInTheDocument();
    expect(sent.at(-1)?.body).toEqual({ token, name: 'Ada', password: 'quite a long one' });
  });
  it('asks who has an account for its password only', async () => {
    fakeApi({
      'POST /api/invitation/read': { body: { ...invitation, hasAccount: true } },
      'POST /api/invitation/accept': apiError(401, 'wrong-credentials'),
    });
    open();
    await userEvent.type(await screen.findByLabelText('Password'), 'not the right one{Enter}');
    expect(await screen.findByRole('alert')).toHaveTextContent('password is not right');
    expect(screen.queryByLabelText('Your name')).not.toBeInTheDocument();
  });
  it('says that a spent link is spent, and can be tried again where only the network failed', async () => {
    fakeApi({ 'POST /api/invitation/read': apiError(410, 'gone') });
    const { unmount } = open();
    expect(await screen.findByRole('alert')).toHaveTextContent('This link was used already or is too old.');
    expect(screen.queryByRole('button', { name: 'Try again' })).not.toBeInTheDocument();
    unmount();
    fakeApi({ 'POST /api/invitation/read': 'unreachable' });
    open();
    expect(await screen.findByRole('button', { name: 'Try again' })).toBeInTheDocument();
  });
});
