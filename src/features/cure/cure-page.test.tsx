import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { listCoatings } from '#contracts/coatings.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as CurePage } from './cure-page.tsx';
import { baseId, sampleCoatings } from './testing/sample-coatings.ts';

const coatings = listCoatings.reply.parse({ coatings: sampleCoatings });
const address = `GET /api/shops/${shopId}/coatings`;
const account = { ...meAs('painter').account, temperatureUnit: 'F' as const };

function show(at: string, { fahrenheit = false, reply = coatings } = {}) {
  const api = fakeApi({ [address]: { body: reply }, [`GET /api/shops/${shopId}/day`]: apiError(503, 'unavailable') });
  return { ...api, ...renderPage(<CurePage />, { at, me: meAs('painter', fahrenheit ? { account } : {}) }) };
}
const box = (name: string | RegExp) => screen.findByRole('textbox', { name });

describe('the cure desk', () => {
  it('reckons while one types and puts it into the address', async () => {
    const { router } = show('/cure');
    const times = await screen.findByRole('list', { name: 'Least times' });
    expect(within(times).getByText('Flash between coats').closest('li')).toHaveTextContent('10 min');
    const air = await box(/^Air, °C/);
    await userEvent.clear(air);
    expect(air).toHaveAccessibleDescription('Needs a temperature.');
    await userEvent.type(air, '12,5');
    expect(await screen.findByText(/do not spray: never under 15 °C/)).toBeVisible();
    await waitFor(() => expect(router.state.location.search).toBe('?air=12%2C5C'));
    await expectAccessible();
  });

  it('opens the view of a link in the reader’s unit', async () => {
    show('/cure?tab=bakes&from=60C&to=50C&coating=typed&dry=', { fahrenheit: true });
    // 30 min at 60 C is 52.4 min at 50 C with 50 kJ/mol.
    expect(await screen.findByText('52.4 min', { selector: 'strong' })).toBeVisible();
    expect(await box(/^at metal, °F/)).toHaveValue('140');
    expect(screen.getByText(/at 122 °F cures as far as 30 min at 140 °F/)).toBeVisible();
  });

  it('goes back to the tab one came from', async () => {
    const { router } = show('/cure');
    await userEvent.click(await screen.findByRole('tab', { name: 'Dew point' }));
    expect(router.state.location.search).toBe('?tab=dew');
    await router.navigate(-1);
    await waitFor(() =>
      expect(screen.getByRole('tab', { name: 'Flash and cure' })).toHaveAttribute('aria-selected', 'true'),
    );
  });

  it('refuses a surface short of 3.0 C over the dew point', async () => {
    show('/cure?tab=dew&air=16C&rh=71&surf=13C');
    expect(await screen.findByText(/No go: only 2\.\d °C over the dew point, 3\.0 °C needed/)).toBeVisible();
    await expectAccessible();
  });

  it('refuses a lamp above the limit of the part in words', async () => {
    show('/cure?tab=lamp&material=abs&want=70C');
    expect(await screen.findByText(/^Refused: 70 °C is above the part’s limit of 60 °C\./)).toBeVisible();
    expect(screen.getAllByText('none: above the limit of 60 °C')).toHaveLength(2);
    await expectAccessible();
  });

  it('adds and takes out bakes', async () => {
    show('/cure?tab=bakes');
    await userEvent.click(await screen.findByRole('button', { name: 'Add a bake' }));
    expect(await screen.findByText('Cured')).toBeVisible();
    await userEvent.click(screen.getByRole('button', { name: 'Take bake 2 out' }));
    expect(await screen.findByText('10 min', { selector: 'strong' })).toBeVisible();
    await expectAccessible();
  });

  it('goes on with typed lamps where those of the shop cannot be had', async () => {
    show('/cure?tab=circuit');
    expect(await screen.findByText(/The shop's lamps could not be loaded\./)).toBeVisible();
    await userEvent.click(screen.getByRole('radio', { name: 'Typed' }));
    expect(await screen.findByText('All 2 may burn at once')).toBeVisible();
    await expectAccessible();
  });

  it('takes a typed sheet where the shop has no coatings, and says so of a link to a strange one', async () => {
    const { unmount } = show('/cure', { reply: { coatings: [] } });
    expect(await screen.findByText('The shop keeps no coatings yet.')).toBeVisible();
    expect(await screen.findByRole('list', { name: 'Least times' })).toBeVisible();
    unmount();
    show('/cure?coating=01958000-0009-7000-8000-00000000dead');
    expect(await screen.findByText(/names a coating that this shop does not keep/)).toBeVisible();
  });
});

describe('a bake trace', () => {
  const rows = ['10:00:00;20,0', '10:10:00;60,0', '10:20:00;OPEN', '10:30:00;60,0', '10:45:00;25,0'];
  const csv = (lines: string[]) => new File([['Time;Panel °C', ...lines].join('\n')], 'bake.csv', { type: 'text/csv' });

  it('is read here, drawn and judged, with its faults line by line', async () => {
    const { sent } = show('/cure?tab=trace&coating=typed');
    await userEvent.upload(await screen.findByLabelText('Logger file', { selector: 'input' }), csv(rows));
    // Ramp, hold and cool are worth 3.8946 + 20 + 6.4584 min at 60 C with 50 kJ/mol (quadrature outside the program).
    expect(await screen.findByRole('img', { name: /cure it earned: 30\.4 of 30 min/ })).toBeVisible();
    expect(screen.getByText('Cured by the sheet of The sheet you typed')).toBeVisible();
    expect(screen.getByRole('row', { name: '4 Panel °C: “OPEN” is no number' })).toBeVisible();
    expect(sent.every(({ method }) => method === 'GET')).toBe(true);
    await expectAccessible();
  });

  it('tells how much is missing, and a limit that was passed', async () => {
    show('/cure?tab=trace&coating=typed&limit=55C');
    await userEvent.upload(await screen.findByLabelText('Logger file', { selector: 'input' }), csv(rows.slice(0, 2)));
    expect(await screen.findByText('Not yet cured: 26.2 min short at 60 °C')).toBeVisible();
    expect(screen.getByText(/It reached 60 °C, above the limit of 55 °C/)).toBeVisible();
  });

  it('stays when one looks at another tab', async () => {
    show('/cure?tab=trace');
    await userEvent.upload(await screen.findByLabelText('Logger file', { selector: 'input' }), csv(rows));
    await screen.findByText('bake.csv', { selector: 'strong' });
    await userEvent.click(screen.getByRole('tab', { name: 'Bakes' }));
    await userEvent.click(screen.getByRole('tab', { name: 'Bake trace' }));
    expect(screen.getByText('bake.csv', { selector: 'strong' })).toBeVisible();
  });

  it('says what is wrong with a file and with a sheet that has no cure', async () => {
    show(`/cure?tab=trace&coating=${baseId}`);
    const input = await screen.findByLabelText('Logger file', { selector: 'input' });
    await userEvent.upload(input, new File(['nothing here'], 'letter.txt', { type: 'text/plain' }));
    expect(await screen.findByRole('alert')).toHaveTextContent('letter.txt: No line has a time and a temperature.');
    await userEvent.upload(input, csv(rows));
    expect(await screen.findByText(/Basecoat prints neither a bake nor an air-dry time/)).toBeVisible();
  });
});
