import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, expect, it, vi } from 'vitest';
import { defaultAirSettings, type AirView } from '#contracts/air.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as Air } from './air-page.tsx';

afterEach(() => vi.unstubAllGlobals());
const zoneId = '018f3a00-0000-7000-8000-000000000301';
const reading = {
  id: '018f3a00-0000-7000-8000-000000000302',
  at: '2026-03-12T08:20:00.000Z',
  celsius: 16,
  humidity: 71,
  surfaceCelsius: 13,
  source: 'key' as const,
};
// The worked case of ISO 8502-4 practice: 16 C and 71 %, dew point 11, surface 13: refuse.
const view: AirView = {
  serverTime: '2026-03-12T08:31:00.000Z',
  settings: defaultAirSettings,
  zones: [
    {
      id: zoneId,
      name: 'Booth 1',
      places: ['Booth 1'],
      latest: reading,
      gate: {
        open: false,
        fresh: true,
        dewPointCelsius: 10.8,
        surfaceCelsius: 13,
        surfaceMeasured: true,
        marginCelsius: 2.2,
        neededCelsius: 3,
      },
      source: 'default',
      schedule: [],
      version: 0,
      expected: { celsius: 20, humidity: 50 },
    },
  ],
};
const air = `/api/shops/${shopId}/air`;
const answers = {
  [`GET ${air}`]: { body: view },
  [`GET ${air}/zones/${zoneId}/readings`]: { body: { total: 1, readings: [reading] } },
};
const now = () => Date.parse(view.serverTime);
const show = (role: 'lead' | 'office' = 'lead') => renderPage(<Air />, { me: meAs(role), at: '/shop/air', now });

it('says in big figures and in words that the gate is shut', async () => {
  fakeApi(answers);
  show();
  const zone = await screen.findByRole('region', { name: 'Booth 1' });
  expect(zone).toHaveTextContent('Do not spray: the surface is 2.2 °C over the dew point, and has to be 3 °C over it.');
  expect(within(zone).getByText('10.8 °C')).toBeInTheDocument();
  expect(await within(zone).findByRole('img', { name: /Surface over dew point/ })).toBeInTheDocument();
  await expectAccessible();
});

it('takes a reading by hand, once it can be one', async () => {
  const { sent } = fakeApi({
    ...answers,
    [`POST ${air}/zones/${zoneId}/readings`]: { body: { written: 1, duplicate: 0 } },
  });
  show();
  const user = userEvent.setup();
  await user.click(await screen.findByRole('button', { name: 'Add a reading in Booth 1' }));
  await user.type(screen.getByLabelText('Air, °C'), '99');
  await user.type(screen.getByLabelText('Humidity, %'), '55');
  await user.click(screen.getByRole('button', { name: 'Keep it' }));
  expect(await screen.findByText('Enter a temperature from -20 to 60 °C.')).toBeInTheDocument();
  await user.clear(screen.getByLabelText('Air, °C'));
  await user.type(screen.getByLabelText('Air, °C'), '19,5');
  await user.click(screen.getByRole('button', { name: 'Keep it' }));
  await waitFor(() => expect(sent.some(({ method }) => method === 'POST')).toBe(true));
  expect(sent.find(({ method }) => method === 'POST')?.body).toMatchObject({
    celsius: 19.5,
    humidity: 55,
    surfaceCelsius: null,
  });
});

it('shows who may not write the air without the deeds', async () => {
  fakeApi(answers);
  show('office');
  await screen.findByRole('region', { name: 'Booth 1' });
  expect(screen.queryByRole('button', { name: /Add a reading/ })).toBeNull();
  expect(screen.queryByRole('button', { name: /Planner’s air/ })).toBeNull();
});
