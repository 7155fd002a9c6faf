import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { Place } from '#contracts/places.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { readAirFlow, readVolume } from './model/place-form.ts';
import { Component as Places } from './places-page.tsx';

afterEach(() => vi.unstubAllGlobals());

const me = meAs('owner');
const id = (n: number) => `018f3a00-0000-7000-8000-0000000002${String(n).padStart(2, '0')}`;
const place = (n: number, name: string, more: Partial<Place> = {}): Place => ({
  id: id(n),
  version: 1,
  kind: 'booth',
  name,
  zoneId: null,
  units: 4,
  bakes: true,
  bakeLimitCelsius: 80,
  volumeM3: 96,
  airFlowM3PerHour: 20_000,
  clearanceMinutes: 5,
  retired: false,
  purge: { minutes: 3, refused: null },
  ...more,
});
const first = place(1, 'Booth 1');
const second = place(2, 'Booth 2', { airFlowM3PerHour: null, purge: { minutes: null, refused: 'air-flow-unknown' } });
const prep = place(3, 'Prep 1', { kind: 'prep', bakes: false, bakeLimitCelsius: null, zoneId: id(9) });
const list = `GET /api/shops/${shopId}/places`;
const zones = [{ id: id(9), name: 'Quay bay', version: 1 }];
const at = '/shop/places';
const now = () => Date.parse('2026-03-12T08:00:00Z');

it('shows each kind in the order of its rows, and where no heat may be planned', async () => {
  fakeApi({ [list]: { body: { places: [first, second, prep], zones } } });
  renderPage(<Places />, { me, at });
  const booths = await screen.findByRole('region', { name: 'Booths' });
  // In the column, and below the name for phones.
  expect(within(booths).getAllByText('3 min')).toHaveLength(2);
  expect(within(booths).getAllByText('no heat: air flow unknown')).toHaveLength(2);
  expect(within(screen.getByRole('region', { name: 'Prep stations' })).getByText('Quay bay')).toBeInTheDocument();
  await expectAccessible();
});

it('offers the first step where there is nothing, and only to who may take it', async () => {
  fakeApi({ [list]: { body: { places: [], zones: [] } } });
  const { unmount } = renderPage(<Places />, { me, at });
  expect(await screen.findByText('No booth and no station yet')).toBeInTheDocument();
  expect(screen.getAllByRole('button', { name: 'Add a place' })).toHaveLength(2);
  unmount();
  renderPage(<Places />, { me: meAs('painter'), at });
  expect(await screen.findByText('No booth and no station yet')).toBeInTheDocument();
  expect(screen.queryByRole('button', { name: 'Add a place' })).not.toBeInTheDocument();
});

describe('a booth', () => {
  const saved = (body: object) => ({ body: { place: { ...first, ...body, version: 2 }, clashes: [] } });

  it('is given an air flow in cubic feet, and says its purge at once', async () => {
    const { sent } = fakeApi({
      [list]: { body: { places: [first, second], zones } },
      [`PATCH /api/shops/${shopId}/places/${second.id}`]: (request) => saved(request.body as object),
    });
    renderPage(<Places />, { me, at });
    await userEvent.click(await screen.findByRole('button', { name: 'Booth 2' }));
    const dialog = within(screen.getByRole('dialog', { name: 'Booth 2' }));
    expect(dialog.getByText('No heat is planned here')).toBeInTheDocument();
    // 3,024 ft3 at 3,000 cfm: 4.032 min (IFC 2018 ch. 24, four changes of air).
    const volume = dialog.getByLabelText('Volume (optional)');
    await userEvent.clear(volume);
    await userEvent.type(volume, '3024 ft3');
    await userEvent.type(dialog.getByLabelText('Air flow (optional)'), '3000 cfm');
    expect(dialog.getByText('Purge before heat: 5 min')).toBeInTheDocument();
    expect(dialog.getByText(/exactly 4.032 min/)).toBeInTheDocument();
    await expectAccessible();
    await userEvent.click(dialog.getByRole('button', { name: 'Save' }));
    await waitFor(() => expect(screen.queryByRole('dialog')).not.toBeInTheDocument());
    expect(sent.find(({ method }) => method === 'PATCH')?.body).toMatchObject({
      version: 1,
      volumeM3: 85.63,
      airFlowM3PerHour: 5097.03,
    });
  });

  it('keeps what was typed where somebody else was faster, and saves over theirs when asked again', async () => {
    let tries = 0;
    const { sent } = fakeApi({
      [list]: { body: { places: [first, second], zones } },
      [`PATCH /api/shops/${shopId}/places/${first.id}`]: () =>
        (tries += 1) === 1
          ? apiError(409, 'stale', { current: { ...first, units: 8, version: 5 } })
          : { body: { place: first, clashes: [] } },
    });
    renderPage(<Places />, { me, at });
    await userEvent.click(await screen.findByRole('button', { name: 'Booth 1' }));
    const units = screen.getByLabelText('Room, in units');
    await userEvent.clear(units);
    await userEvent.type(units, '6');
    await userEvent.click(screen.getByRole('button', { name: 'Save' }));
    expect(await screen.findByText('Somebody else changed it in the meantime.')).toBeInTheDocument();
    expect(screen.getByText(/Now it says: Booth 1, 8 units/)).toBeInTheDocument();
    expect(units).toHaveValue('6');
    await userEvent.click(screen.getByRole('button', { name: 'Save' }));
    await waitFor(() => expect(screen.queryByRole('dialog')).not.toBeInTheDocument());
    expect(sent.filter(({ method }) => method === 'PATCH').map(({ body }) => body)).toMatchObject([
      { version: 1, units: 6 },
      { version: 5, units: 6 },
    ]);
  });

  it('says beside the field what is wrong, and sends nothing', async () => {
    const { sent } = fakeApi({ [list]: { body: { places: [first], zones } } });
    renderPage(<Places />, { me, at });
    await userEvent.click(await screen.findByRole('button', { name: 'Add a place' }));
    await userEvent.type(screen.getByLabelText('Air flow (optional)'), 'a lot');
    await userEvent.click(screen.getByRole('button', { name: 'Add it' }));
    expect(screen.getByLabelText('Name')).toHaveAccessibleDescription('Enter a name.');
    expect(screen.getByLabelText('Air flow (optional)')).toHaveAccessibleDescription(/Enter it as 20000/);
    expect(sent.filter(({ method }) => method !== 'GET')).toEqual([]);
  });

  it('tells which posted work no longer fits, with the way to that day', async () => {
    const clash = {
      stageId: id(20),
      jobId: id(21),
      jobNumber: 12,
      jobTitle: 'Door',
      stageTitle: 'Clear',
      from: '2026-03-13T08:00:00.000Z',
      to: '2026-03-13T09:00:00.000Z',
      reason: {
        code: 'does-not-fit',
        rule: 4,
        stageId: id(20),
        ids: [first.id],
        names: ['Booth 1'],
        at: [],
        minutes: [3, 2],
      },
    };
    fakeApi({
      [list]: { body: { places: [first], zones } },
      [`PATCH /api/shops/${shopId}/places/${first.id}`]: { body: { place: first, clashes: [clash] } },
    });
    renderPage(<Places />, { me, at, now });
    await userEvent.click(await screen.findByRole('button', { name: 'Booth 1' }));
    await userEvent.click(screen.getByRole('button', { name: 'Save' }));
    const told = within(await screen.findByRole('alert', { name: /Posted work/ }));
    expect(told.getByText(/It takes 3 units of room, and Booth 1 has 2/)).toBeInTheDocument();
    expect(told.getByRole('link', { name: 'tomorrow 9:00 to 10:00' })).toHaveAttribute(
      'href',
      `/day?date=2026-03-13&stage=${id(20)}`,
    );
  });

  it('is not retired while work stands in it, and says which', async () => {
    const reason = {
      code: 'still-booked',
      rule: null,
      stageId: id(20),
      ids: [],
      names: ['Booth 1', '12 Door, Clear'],
      at: ['2026-03-13T08:00:00.000Z', '2026-03-13T09:00:00.000Z'],
      minutes: [1],
    };
    fakeApi({
      [list]: { body: { places: [first], zones } },
      [`POST /api/shops/${shopId}/places/${first.id}/retire`]: apiError(422, 'refused', { reasons: [reason] }),
    });
    renderPage(<Places />, { me, at, now });
    await userEvent.click(await screen.findByRole('button', { name: 'Retire Booth 1' }));
    await userEvent.click(screen.getByRole('button', { name: 'Retire it' }));
    expect(await screen.findByText(/Booth 1 has posted work: 12 Door, Clear, tomorrow 9:00/)).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'Open the day of the first' })).toHaveAttribute(
      'href',
      '/day?date=2026-03-13',
    );
    await expectAccessible();
  });

  it('moves among its kind', async () => {
    const { sent } = fakeApi({
      [list]: { body: { places: [first, second, prep], zones } },
      [`POST /api/shops/${shopId}/places-order`]: { status: 204 },
    });
    renderPage(<Places />, { me, at });
    await userEvent.click(await screen.findByRole('button', { name: 'Move Booth 2 up' }));
    await waitFor(() => expect(sent.find(({ method }) => method === 'POST')).toBeDefined());
    expect(sent.find(({ method }) => method === 'POST')?.body).toEqual({ placeIds: [second.id, first.id, prep.id] });
  });
});

// The international foot is 0.3048 m (1959): 3,024 ft3 are 85.630 m3, 3,000 cfm are 5,097.0 m3/h.
describe('quantities as typed', () => {
  it.each([
    ['96', 96],
    ['96,5 m3', 96.5],
    ['3024 ft3', 85.63],
    ['big', null],
  ])('volume %s', (text, cubicMetres) => {
    const read = readVolume(text);
    if (cubicMetres === null) expect(read).toBeNull();
    else expect(read).toBeCloseTo(cubicMetres, 2);
  });
  it.each([
    ['20000', 20_000],
    ['20000 m³/h', 20_000],
    ['3000 cfm', 5097.03],
    ['12 rpm', null],
  ])('air flow %s', (text, flow) => {
    const read = readAirFlow(text);
    if (flow === null) expect(read).toBeNull();
    else expect(read).toBeCloseTo(flow, 2);
  });
});
