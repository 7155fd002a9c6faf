import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, expect, it, vi } from 'vitest';
import { expectAccessible } from '#src/testing/axe.ts';
import { fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as Upkeep } from './upkeep-page.tsx';

afterEach(() => vi.unstubAllGlobals());

const id = (n: number) => `018f3a00-0000-7000-8000-0000000004${String(n).padStart(2, '0')}`;
const booth = { id: id(1), name: 'Booth 1', retired: false };
const place = {
  ...booth,
  version: 1,
  kind: 'booth',
  zoneId: null,
  units: 4,
  bakes: false,
  bakeLimitCelsius: null,
  volumeM3: null,
  airFlowM3PerHour: null,
  clearanceMinutes: 0,
  purge: { minutes: null, refused: 'volume-unknown' },
};
const clean = {
  id: id(2),
  version: 1,
  kind: 'maintenance',
  label: 'Clean the booth',
  placeId: booth.id,
  lampId: null,
  startsLocal: '2026-03-13T07:00',
  rule: 'FREQ=WEEKLY;INTERVAL=2;BYDAY=FR',
  minutes: 120,
};
const filter = {
  id: id(3),
  version: 1,
  placeId: booth.id,
  name: 'Exhaust',
  changeAfterHours: 200,
  changeAfterDays: null,
  pascalLimit: 150,
  efficiencyPercent: 98,
  retired: false,
  standing: {
    state: 'due',
    because: 'pressure',
    changedAt: '2026-02-02T08:00:00.000Z',
    sprayHours: 61.5,
    hoursPerDay: 1.5,
    dueOn: '2026-06-12',
    pascals: 155,
    measuredAt: '2026-03-11T08:00:00.000Z',
  },
  entries: [{ id: id(4), kind: 'pressure', at: '2026-03-11T08:00:00.000Z', pascals: 155, note: '', by: 'Tove' }],
};
const hours = { version: 1, timeZone: 'Europe/Berlin', week: [], next: null, extra: [], lamps: [], places: [booth] };
const answers = {
  [`GET /api/shops/${shopId}/hours`]: { body: { ...hours, closures: [clean] } },
  [`GET /api/shops/${shopId}/places`]: { body: { places: [place], zones: [] } },
  [`GET /api/shops/${shopId}/filters`]: { body: { filters: [filter] } },
};
const now = () => Date.parse('2026-03-12T08:00:00Z');
const at = '/shop/upkeep';

it('says what comes again and which filter is due, and why', async () => {
  fakeApi(answers);
  renderPage(<Upkeep />, { me: meAs('owner'), at, now });
  const rules = within(await screen.findByRole('region', { name: 'Maintenance' }));
  expect(rules.getByText('Every 2 weeks on Friday at 7:00 for 2 h')).toBeInTheDocument();
  expect(rules.getAllByText('tomorrow 7:00 to 9:00').length).toBeGreaterThan(0);
  const card = within(screen.getByRole('region', { name: 'Exhaust, Booth 1' }));
  expect(card.getByText('due by its pressure')).toBeInTheDocument();
  expect(card.getByText('155 Pa of 150 Pa')).toBeInTheDocument();
  expect(card.getByText('61.5 h of 200 h')).toBeInTheDocument();
  await expectAccessible();
});

it('takes a reading of the gauge from a painter, who changes nothing else', async () => {
  const { sent } = fakeApi({
    ...answers,
    [`POST /api/shops/${shopId}/filters/${filter.id}/entries`]: { body: filter },
  });
  renderPage(<Upkeep />, { me: meAs('painter'), at, now });
  await userEvent.click(await screen.findByRole('button', { name: /^Enter a pressure/ }));
  await userEvent.click(screen.getByRole('button', { name: 'Note it' }));
  expect(screen.getByLabelText('Pressure, Pa')).toHaveAccessibleDescription(/Enter the pascals that the gauge shows/);
  await userEvent.type(screen.getByLabelText('Pressure, Pa'), '92,5');
  await expectAccessible();
  await userEvent.click(screen.getByRole('button', { name: 'Note it' }));
  await waitFor(() => expect(screen.queryByRole('dialog')).not.toBeInTheDocument());
  expect(sent.find(({ method }) => method === 'POST')?.body).toMatchObject({
    kind: 'pressure',
    pascals: 92.5,
    note: '',
  });
  expect(screen.queryByRole('button', { name: /Add|Change what|Remove|Strike/ })).not.toBeInTheDocument();
});

it('needs something that makes a filter due', async () => {
  const { sent } = fakeApi({ ...answers, [`POST /api/shops/${shopId}/filters`]: { body: filter } });
  renderPage(<Upkeep />, { me: meAs('owner'), at, now });
  await userEvent.click(await screen.findByRole('button', { name: 'Add a filter' }));
  await userEvent.type(screen.getByLabelText('Name'), 'Ceiling');
  await userEvent.click(screen.getByRole('button', { name: 'Add it' }));
  expect(screen.getByLabelText('After hours sprayed (optional)')).toHaveAccessibleDescription(/what makes it due/);
  await userEvent.type(screen.getByLabelText('After days (optional)'), '180');
  await userEvent.click(screen.getByRole('button', { name: 'Add it' }));
  await waitFor(() => expect(screen.queryByRole('dialog')).not.toBeInTheDocument());
  expect(sent.find(({ method }) => method === 'POST')?.body).toEqual({
    placeId: booth.id,
    name: 'Ceiling',
    changeAfterHours: null,
    changeAfterDays: 180,
    pascalLimit: null,
    efficiencyPercent: null,
  });
});
