import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as Account } from './account-page.tsx';
import { Component as Letters } from './letters-page.tsx';
import { Component as Licences } from './licences-page.tsx';
import { Component as Mailbox } from './mailbox-page.tsx';
import { Component as Members } from './members-page.tsx';

afterEach(() => vi.unstubAllGlobals());
const me = meAs('owner');

describe('the account', () => {
  it('keeps clock and units', async () => {
    const changed = { ...me, account: { ...me.account, clock: '12' as const } };
    const { sent } = fakeApi({ 'PATCH /api/account': { body: changed } });
    renderPage(<Account />, { me });
    await userEvent.click(screen.getByRole('radio', { name: '2:30 pm' }));
    await waitFor(() => expect(sent).toHaveLength(1));
    expect(sent[0]?.body).toEqual({ clock: '12' });
    expect(screen.getByRole('radio', { name: '2:30 pm' })).toBeChecked();
  });
  it('falls back to what holds where a choice is refused', async () => {
    fakeApi({ 'PATCH /api/account': 'unreachable' });
    renderPage(<Account />, { me });
    await userEvent.click(screen.getByRole('radio', { name: '°F' }));
    expect(await screen.findByRole('alert')).toHaveTextContent('The choice could not be kept.');
    expect(screen.getByRole('radio', { name: '°C' })).toBeChecked();
  });
  it('says beside the field that the password is another one', async () => {
    fakeApi({ 'POST /api/account/password': apiError(401, 'wrong-credentials') });
    renderPage(<Account />, { me });
    await userEvent.type(screen.getByLabelText('Password now'), 'a wrong one');
    await userEvent.type(screen.getByLabelText('New password'), 'a new long one{Enter}');
    await waitFor(() =>
      expect(screen.getByLabelText('Password now')).toHaveAccessibleDescription('This is not your password now.'),
    );
    await expectAccessible();
  });
});

describe('members', () => {
  const id = (n: number) => `018f3a00-0000-7000-8000-00000000010${n}`;
  const member = (n: number, name: string, more: object = {}) => ({
    id: id(n),
    accountId: id(n + 4),
    name,
    email: `${name.toLowerCase()}@saltmarsh.example`,
    role: 'painter',
    personId: null,
    disabled: false,
    ...more,
  });
  const list = `GET /api/shops/${shopId}/members`;
  const members = [member(1, 'Imke', { accountId: me.account.id, role: 'owner' }), member(2, 'Ada')];

  it('get another role, and stay as before where that is refused', async () => {
    const reason = { code: 'last-owner', rule: null, stageId: null, ids: [], names: ['Ada'], at: [], minutes: [] };
    const { sent } = fakeApi({
      [list]: { body: { members, invitations: [] } },
      [`PATCH /api/shops/${shopId}/members/${id(2)}`]: apiError(422, 'refused', { reasons: [reason] }),
    });
    renderPage(<Members />, { me });
    await userEvent.selectOptions(await screen.findByLabelText('Role of Ada'), 'paint lead');
    expect(await screen.findByRole('alert')).toHaveTextContent('Ada is the only owner.');
    expect(sent.find(({ method }) => method === 'PATCH')?.body).toEqual({ role: 'lead' });
    expect(screen.getByLabelText('Role of Ada')).toHaveValue('painter');
    expect(screen.queryByLabelText('Role of Imke')).not.toBeInTheDocument();
    await expectAccessible();
  });
  it('are invited by a letter', async () => {
    const { sent } = fakeApi({
      [list]: { body: { members, invitations: [] } },
      [`POST /api/shops/${shopId}/invitations`]: { body: { id: id(9) } },
    });
    renderPage(<Members />, { me });
    await userEvent.click(await screen.findByRole('button', { name: 'Invite' }));
    const dialog = within(screen.getByRole('dialog', { name: 'Invite into the shop' }));
    await userEvent.type(dialog.getByLabelText('E-mail'), 'new@saltmarsh.example');
    await userEvent.selectOptions(dialog.getByLabelText('Role'), 'office');
    await userEvent.click(dialog.getByRole('button', { name: 'Send the letter' }));
    await waitFor(() => expect(screen.queryByRole('dialog')).not.toBeInTheDocument());
    const invited = sent.find(({ method }) => method === 'POST');
    expect(invited?.body).toEqual({ email: 'new@saltmarsh.example', role: 'office', personId: null });
  });
  it('are nobody else’s business', () => {
    const { sent } = fakeApi({});
    renderPage(<Members />, { me: meAs('lead') });
    expect(screen.getByText(/Only owners of the shop see this page/)).toBeInTheDocument();
    expect(sent).toEqual([]);
  });
  it('can be asked for again where they did not come', async () => {
    let tries = 0;
    fakeApi({ [list]: () => (++tries === 1 ? 'unreachable' : { body: { members, invitations: [] } }) });
    renderPage(<Members />, { me });
    await userEvent.click(await screen.findByRole('button', { name: 'Try again' }));
    expect(await screen.findByText('ada@saltmarsh.example')).toBeInTheDocument();
  });
});

describe('letters sent', () => {
  it('show what nobody got, and why', async () => {
    const letter = { id: shopId, kind: 'plan-changed', to: 'ada@saltmarsh.example', state: 'dead' };
    const { sent } = fakeApi({
      [`GET /api/shops/${shopId}/letters`]: {
        body: {
          letters: [{ ...letter, createdAt: '2026-03-12T08:00:00Z', sentAt: null, lastError: '550 no such mailbox' }],
        },
      },
    });
    renderPage(<Letters />, { me, at: '/shop/letters?state=dead' });
    expect(await screen.findByText('550 no such mailbox')).toBeInTheDocument();
    expect(screen.getByText('could not be delivered')).toBeInTheDocument();
    expect(sent[0]?.query.get('state')).toBe('dead');
    await expectAccessible();
  });
});

describe('the local mailbox', () => {
  const head = {
    id: 'one',
    at: '2026-03-12T08:00:00Z',
    from: 'ovenbird@localhost',
    to: 'ada@saltmarsh.example',
    subject: 'Your invitation',
    messageId: 'x',
  };
  it('shows a letter with links that can be pressed', async () => {
    fakeApi({
      'GET /api/mailbox': { body: { letters: [head] } },
      'GET /api/mailbox/one': { body: { ...head, text: 'Go to http://here/invitation#abc.', html: '<p>Go</p>' } },
    });
    renderPage(<Mailbox />, { me: null, at: '/mailbox?letter=one' });
    const link = await screen.findByRole('link', { name: 'http://here/invitation#abc' });
    expect(link).toHaveAttribute('href', 'http://here/invitation#abc');
    await userEvent.click(screen.getByRole('radio', { name: 'As laid out' }));
    expect(screen.getByTitle('Your invitation')).toHaveAttribute(
      'sandbox',
      expect.not.stringContaining('allow-scripts'),
    );
  });
  it('says so where there is none', async () => {
    fakeApi({ 'GET /api/mailbox': apiError(404, 'not-found') });
    renderPage(<Mailbox />, { me: null, at: '/mailbox' });
    expect(await screen.findByText('There is no local mailbox here')).toBeInTheDocument();
  });
});

describe('licences and cautions', () => {
  it('lists notices and finds one', async () => {
    const notices = ['alpha', 'beta'].map((name) => ({ name, version: '1.0.0', licence: 'MIT', text: `of ${name}` }));
    fakeApi({ 'GET /licences.json': { body: notices, headers: { 'content-type': 'application/json' } } });
    renderPage(<Licences />, { me: null, at: '/licences' });
    expect(screen.getByRole('note', { name: 'Caution' })).toHaveTextContent('isocyanates');
    await userEvent.type(await screen.findByLabelText('Search'), 'bet');
    expect(await screen.findByText('1 of 2 are listed.')).toBeInTheDocument();
    expect(screen.queryByText('alpha')).not.toBeInTheDocument();
    await expectAccessible();
  });
});
