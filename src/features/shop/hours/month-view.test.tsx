import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, expect, it, vi } from 'vitest';
import type { Closure } from '#contracts/hours.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { stubWidth } from '#src/testing/media.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as Hours } from './hours-page.tsx';

afterEach(() => vi.unstubAllGlobals());

const id = (n: number) => `018f3a00-0000-7000-8000-0000000003${String(n).padStart(2, '0')}`;
const closure = (n: number, more: Partial<Closure>): Closure => ({
  id: id(n),
  version: 1,
  kind: 'closure',
  label: '',
  placeId: null,
  lampId: null,
  startsLocal: '2026-03-13T12:00',
  rule: null,
  minutes: 60,
  ...more,
});
/** Fridays at 23:30: in UTC 22:30 before the clocks of Berlin change on 29 March 2026, 21:30 after. */
const fridays = closure(1, {
  label: 'Floor wash',
  startsLocal: '2026-03-13T23:30',
  rule: 'FREQ=WEEKLY;BYDAY=FR',
  minutes: 20,
});
const service = closure(2, {
  kind: 'maintenance',
  label: 'Burner service',
  placeId: id(5),
  startsLocal: '2026-03-18T07:00',
  minutes: 120,
});
const weekdays = ['MO', 'TU', 'WE', 'TH', 'FR'].map((day) => ({ day, from: 420, to: 1080 }));
const hoursWith = (closures: Closure[]) => ({
  version: 4,
  timeZone: 'Europe/Berlin',
  week: weekdays,
  next: null,
  extra: [],
  closures,
  places: [{ id: id(5), name: 'Booth 1', retired: false }],
  lamps: [],
});
const read = `GET /api/shops/${shopId}/hours`;
const at = (month: string) => `/shop/hours?view=month&month=${month}`;
// Thursday 12 March 2026, 9:00 in Berlin.
const now = () => Date.parse('2026-03-12T08:00:00Z');
const show = (closures: Closure[], month: string, role: 'owner' | 'painter' = 'owner', others = {}) => {
  fakeApi({ [read]: { body: hoursWith(closures) } });
  return renderPage(<Hours />, { me: meAs(role), at: at(month), now, ...others });
};
const cell = (name: RegExp) => screen.findByRole('cell', { name });

it('shows what comes again on the days of the shop’s clock, also after the clocks change', async () => {
  show([fridays], '2026-03');
  const table = within(await screen.findByRole('table', { name: 'March 2026' }));
  const days = (await table.findAllByRole('link', { name: /Floor wash/ })).map(
    (link) => link.closest('td')?.dataset['date'],
  );
  expect(days).toEqual(['2026-03-13', '2026-03-20', '2026-03-27']);
  expect(table.getAllByText('23:30 to 23:50')).toHaveLength(3);
  await expectAccessible();
  await userEvent.click(screen.getByRole('button', { name: 'Later month' }));
  const april = within(await screen.findByRole('table', { name: 'April 2026' }));
  const later = (await april.findAllByRole('link', { name: /Floor wash/ })).map(
    (link) => link.closest('td')?.dataset['date'],
  );
  expect(later).toEqual(['2026-04-03', '2026-04-10', '2026-04-17', '2026-04-24']);
  expect(april.getAllByText('23:30 to 23:50')).toHaveLength(4);
});

it('says of each day when the shop is open, less what closes all of it', async () => {
  const holiday = closure(3, { kind: 'holiday', label: 'Fair', startsLocal: '2026-03-16T00:00', minutes: 1440 });
  show([holiday, closure(4, {})], '2026-03');
  expect(await cell(/^Friday 13 March: 7:00 to 12:00 13:00 to 18:00/)).toBeInTheDocument();
  expect(await cell(/^Saturday 14 March: closed/)).toHaveClass('day-shut');
  expect(await cell(/^Monday 16 March: closed/)).toHaveClass('day-shut');
  expect(await cell(/^Thursday 12 March, today: 7:00 to 18:00/)).toBeInTheDocument();
  // What the hours were then is not known here.
  expect(await cell(/^Wednesday 11 March:$/)).toBeInTheDocument();
});

it('opens the closure that is chosen, and upkeep where it is maintenance', async () => {
  const { router } = show([fridays, service], '2026-03', 'owner', {
    others: [{ path: '/shop/upkeep', element: <p>The upkeep</p> }],
  });
  await userEvent.click((await screen.findAllByRole('link', { name: /Floor wash/ }))[1] as HTMLElement);
  expect(within(await screen.findByRole('dialog', { name: 'Floor wash' })).getByLabelText(/What for/)).toHaveValue(
    'Floor wash',
  );
  expect(router.state.location.search).toBe(`?view=month&month=2026-03&edit=${id(1)}`);
  await userEvent.keyboard('{Escape}');
  await waitFor(() => expect(router.state.location.search).toBe('?view=month&month=2026-03'));
  const upkeep = screen.getByRole('link', { name: /Burner service Maintenance, Booth 1 7:00 to 9:00/ });
  upkeep.focus();
  await userEvent.keyboard('{Enter}');
  expect(await screen.findByText('The upkeep')).toBeInTheDocument();
  expect(router.state.location.search).toBe(`?edit=${id(2)}`);
});

it('opens the list of a crowded day by keyboard', async () => {
  const five = [1, 2, 3, 4, 5].map((n) => closure(n, { label: `Walk-through ${n}`, placeId: id(5) }));
  show(five, '2026-03');
  const more = await screen.findByRole('button', { name: '+2 more' });
  await expectAccessible();
  more.focus();
  await userEvent.keyboard('{Enter}');
  const list = within(await screen.findByRole('dialog', { name: 'Friday 13 March' }));
  expect(list.getAllByRole('link')).toHaveLength(5);
  await expectAccessible();
  await userEvent.keyboard('{Escape}');
  expect(more).toHaveFocus();
});

it('says that a month is empty, and keeps to the months of the address', async () => {
  const { router } = show([service], '2026-12');
  expect(
    await screen.findByText('No holiday, closure, breakdown or maintenance in December 2026.'),
  ).toBeInTheDocument();
  await userEvent.click(screen.getByRole('button', { name: 'Later month' }));
  expect(router.state.location.search).toBe('?view=month&month=2027-01');
  await userEvent.click(screen.getByRole('button', { name: 'This month' }));
  expect(await screen.findByRole('table', { name: 'March 2026' })).toBeInTheDocument();
  await userEvent.click(screen.getByRole('radio', { name: 'List' }));
  expect(router.state.location.search).toBe('');
  expect(screen.queryByRole('table', { name: 'March 2026' })).not.toBeInTheDocument();
});

it('is a list by day on a phone, and only looked at by a painter', async () => {
  stubWidth(390);
  show([fridays, service], '2026-03', 'painter');
  const calendar = within(await screen.findByRole('region', { name: 'Calendar' }));
  expect(calendar.queryByRole('table')).not.toBeInTheDocument();
  const day = calendar.getByRole('heading', { name: 'Fri 13 Mar' }).closest('li') as HTMLElement;
  expect(day).toHaveTextContent('7:00 to 18:00');
  expect(day).toHaveTextContent('23:30 to 23:50');
  expect(within(day).queryByRole('link')).not.toBeInTheDocument();
  expect(calendar.getByText('Earlier this month')).toBeInTheDocument();
  expect(calendar.getAllByText('closed').length).toBeGreaterThan(0);
  await expectAccessible();
});

it('says that it could not be loaded', async () => {
  fakeApi({ [read]: apiError(500, 'internal') });
  renderPage(<Hours />, { me: meAs('owner'), at: at('2026-03'), now });
  expect(await screen.findByText(/The hours could not be loaded/)).toBeInTheDocument();
});
