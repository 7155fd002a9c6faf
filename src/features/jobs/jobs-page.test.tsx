import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it } from 'vitest';
import { listJobs } from '#contracts/jobs.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi, type Sent } from '#src/testing/fake-api.ts';
import { stubWidth } from '#src/testing/media.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as JobsPage } from './jobs-page.tsx';
import { sampleRow } from './testing/sample-jobs.ts';

const address = `GET /api/shops/${shopId}/jobs`;
const rows = [0, 1, 2, 3].map((n) => sampleRow(n));
const page = (given = rows, total = given.length) => ({
  body: listJobs.reply.parse({ rows: given, total, page: 1, size: 50 }),
});
const now = () => Date.parse('2026-03-12T08:31:00Z');

beforeEach(() => stubWidth(1440));

describe('the list of jobs', () => {
  it('shows state, progress, what is next and the promise with lateness in words', async () => {
    fakeApi({ [address]: page() });
    renderPage(<JobsPage />, { at: '/jobs', now });
    const row = (await screen.findByText('Front cover')).closest('tr');
    expect(row).toHaveTextContent(/2415Front cover.*Planned.*0 of 8.*Base and clear.*today 13:40 · Booth 1.*late/);
    expect(screen.getByRole('link', { name: 'Front cover' })).toHaveAttribute('href', `/jobs/${rows[3]?.id}`);
    expect(screen.getByRole('link', { name: 'New job' })).toBeVisible();
    await expectAccessible();
  });

  it('asks the server for what is typed, in the address too, and `/` leads to the box', async () => {
    const { sent } = fakeApi({ [address]: page() });
    const { router } = renderPage(<JobsPage />, { at: '/jobs?page=3', now });
    await screen.findByText('Front cover');
    await userEvent.keyboard('/door');
    expect(screen.getByRole('searchbox')).toHaveFocus();
    await waitFor(() => expect(sent.at(-1)?.query.get('q')).toBe('door'));
    expect(sent.at(-1)?.query.get('page')).toBe('1');
    expect(router.state.location.search).toBe('?q=door');
  });

  it('sorts by the heads and filters by state', async () => {
    const { sent } = fakeApi({ [address]: page() });
    renderPage(<JobsPage />, { at: '/jobs', now });
    await userEvent.click(await screen.findByRole('button', { name: 'No.' }));
    await waitFor(() => expect(sent.at(-1)?.query.get('sort')).toBe('number'));
    expect(screen.getByRole('columnheader', { name: /No\./ })).toHaveAttribute('aria-sort', 'ascending');
    await userEvent.click(screen.getByRole('tab', { name: 'Late' }));
    await waitFor(() => expect(sent.at(-1)?.query.get('state')).toBe('late'));
  });

  it('pages through more than fit', async () => {
    const { sent } = fakeApi({ [address]: page(rows, 132) });
    renderPage(<JobsPage />, { at: '/jobs', now });
    await userEvent.click(await screen.findByRole('button', { name: 'Next page' }));
    await waitFor(() => expect(sent.at(-1)?.query.get('page')).toBe('2'));
  });

  it('says what an empty list means and how to go on', async () => {
    fakeApi({ [address]: ({ query }: Sent) => (query.get('state') === 'all' ? page() : page([])) });
    renderPage(<JobsPage />, { at: '/jobs?q=zzz', now });
    expect(await screen.findByText('Nothing found for “zzz”')).toBeVisible();
    await expectAccessible();
    await userEvent.click(screen.getByRole('button', { name: 'Search all jobs' }));
    expect(await screen.findByText('Front cover')).toBeVisible();
  });

  it('says why it could not be loaded and tries again', async () => {
    let isBroken = true;
    fakeApi({ [address]: () => (isBroken ? apiError(500, 'internal') : page()) });
    renderPage(<JobsPage />, { at: '/jobs', now });
    const note = await screen.findByRole('alert');
    expect(note).toHaveTextContent('The jobs could not be loaded.');
    await expectAccessible();
    isBroken = false;
    await userEvent.click(within(note).getByRole('button', { name: 'Try again' }));
    expect(await screen.findByText('Front cover')).toBeVisible();
  });

  it('becomes cards on a phone, and offers no new job to painters', async () => {
    stubWidth(390);
    fakeApi({ [address]: page() });
    renderPage(<JobsPage />, { at: '/jobs', now, me: meAs('painter') });
    await screen.findByText('Front cover');
    expect(screen.queryByRole('table')).toBeNull();
    expect(screen.getAllByRole('listitem')).toHaveLength(4);
    expect(screen.queryByRole('link', { name: 'New job' })).toBeNull();
    await expectAccessible();
  });
});
