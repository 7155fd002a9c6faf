import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, expect, it, vi } from 'vitest';
import { expectAccessible } from '#src/testing/axe.ts';
import { fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as Hours } from './hours-page.tsx';

afterEach(() => vi.unstubAllGlobals());

const id = (n: number) => `018f3a00-0000-7000-8000-0000000003${String(n).padStart(2, '0')}`;
const weekdays = ['MO', 'TU', 'WE', 'TH', 'FR'].map((day) => ({ day, from: 420, to: 1080 }));
const christmas = {
  id: id(1),
  version: 3,
  kind: 'holiday',
  label: 'Christmas',
  placeId: null,
  lampId: null,
  startsLocal: '2026-12-25T00:00',
  rule: 'FREQ=YEARLY;BYMONTH=12;BYMONTHDAY=25',
  minutes: 1440,
};
const hours = {
  version: 4,
  timeZone: 'Europe/Berlin',
  week: weekdays,
  next: null,
  extra: [],
  closures: [christmas],
  places: [{ id: id(5), name: 'Booth 1', retired: false }],
  lamps: [],
};
const read = `GET /api/shops/${shopId}/hours`;
const at = '/shop/hours';
// Thursday 12 March 2026, 9:00 in Berlin.
const now = () => Date.parse('2026-03-12T08:00:00Z');

it('shows the week and what lies ahead in everyday words', async () => {
  fakeApi({ [read]: { body: hours } });
  renderPage(<Hours />, { me: meAs('owner'), at, now });
  const table = within(await screen.findByRole('region', { name: 'Holidays and closures' }));
  expect(table.getByText('Every year on 25 December, all day')).toBeInTheDocument();
  expect(table.getByText('Fri 25 Dec')).toBeInTheDocument();
  expect(screen.getAllByText('7:00 to 18:00')).toHaveLength(5);
  expect(screen.getAllByText('closed')).toHaveLength(2);
  await expectAccessible();
});

it('sets another week from a day on, a line a day', async () => {
  const { sent } = fakeApi({
    [read]: { body: hours },
    [`POST /api/shops/${shopId}/week`]: { body: { version: 5, clashes: [] } },
  });
  renderPage(<Hours />, { me: meAs('owner'), at, now });
  await userEvent.click(await screen.findByRole('button', { name: 'Change the week' }));
  expect(screen.getByLabelText('Monday')).toHaveValue('7:00-18:00');
  const saturday = screen.getByLabelText('Saturday');
  await userEvent.type(saturday, '8-12, 11-13');
  await userEvent.click(screen.getByRole('button', { name: 'Save' }));
  expect(saturday).toHaveAccessibleDescription('These hours meet each other.');
  await userEvent.clear(saturday);
  await userEvent.type(saturday, '8-12, 13-15');
  await userEvent.click(screen.getByRole('button', { name: 'As Sat on Sunday' }));
  await expectAccessible();
  await userEvent.click(screen.getByRole('button', { name: 'Save' }));
  await waitFor(() => expect(screen.queryByRole('dialog')).not.toBeInTheDocument());
  const two = (day: string) => [
    { day, from: 480, to: 720 },
    { day, from: 780, to: 900 },
  ];
  expect(sent.find(({ method }) => method === 'POST')?.body).toEqual({
    version: 4,
    from: '2026-03-12',
    week: [...weekdays, ...two('SA'), ...two('SU')],
  });
});

it('lets the lead enter a breakdown of a booth, but not the week', async () => {
  const saved = { ...christmas, id: id(2), kind: 'breakdown', label: '', placeId: id(5), rule: null };
  const { sent } = fakeApi({
    [read]: { body: hours },
    [`POST /api/shops/${shopId}/closures`]: { body: { closure: saved, clashes: [] } },
  });
  renderPage(<Hours />, { me: meAs('lead'), at: `${at}?edit=breakdown`, now });
  await userEvent.selectOptions(await screen.findByLabelText('Of'), 'Booth 1');
  const until = screen.getByLabelText('Until');
  await userEvent.clear(until);
  await userEvent.type(until, '15');
  const time = screen.getByLabelText('Time');
  await userEvent.clear(time);
  await userEvent.type(time, '9.30');
  await expectAccessible();
  await userEvent.click(screen.getByRole('button', { name: 'Enter it' }));
  await waitFor(() => expect(screen.queryByRole('dialog')).not.toBeInTheDocument());
  expect(sent.find(({ method }) => method === 'POST')?.body).toEqual({
    kind: 'breakdown',
    label: '',
    placeId: id(5),
    lampId: null,
    startsLocal: '2026-03-12T09:30',
    rule: null,
    minutes: 330,
  });
  expect(screen.queryByRole('button', { name: 'Change the week' })).not.toBeInTheDocument();
});

it('takes a closure away, and back again', async () => {
  const { sent } = fakeApi({
    [read]: { body: hours },
    [`DELETE /api/shops/${shopId}/closures/${christmas.id}`]: { status: 204 },
    [`POST /api/shops/${shopId}/closures`]: { body: { closure: christmas, clashes: [] } },
  });
  renderPage(<Hours />, { me: meAs('owner'), at, now });
  await userEvent.click(await screen.findByRole('button', { name: 'Remove Christmas' }));
  await userEvent.click(await screen.findByRole('button', { name: 'Undo' }));
  await waitFor(() => expect(sent.some(({ method }) => method === 'POST')).toBe(true));
  const { id: _id, version: _version, ...fields } = christmas;
  expect(sent.find(({ method }) => method === 'POST')?.body).toEqual(fields);
});

it('is only looked at by a painter', async () => {
  fakeApi({ [read]: { body: hours } });
  renderPage(<Hours />, { me: meAs('painter'), at, now });
  expect(await screen.findByText('Christmas')).toBeInTheDocument();
  expect(screen.queryByRole('button', { name: /Remove|Change|Holiday|Breakdown|Import/ })).not.toBeInTheDocument();
});
