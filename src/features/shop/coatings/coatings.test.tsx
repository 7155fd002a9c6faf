import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { CoatingDetail } from '#contracts/coatings.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as CoatingPage } from './coating-page.tsx';
import { Component as CoatingsPage } from './coatings-page.tsx';
import { Component as NewPage } from './new-coating-page.tsx';
import { coatingId, sampleCoating, sampleTouched, touchedIds } from './testing/sample-coating.ts';

afterEach(() => vi.unstubAllGlobals());
const root = `/api/shops/${shopId}`;
const one = `${root}/coatings/${coatingId}`;
const now = () => Date.parse('2026-03-12T08:31:00Z');
const same = { ...sampleTouched, sheets: [], jobs: [] };
type Role = 'owner' | 'lead' | 'painter';

const showList = (role: Role = 'lead', at = '/shop/coatings') =>
  renderPage(<CoatingsPage />, { me: meAs(role), at, now });
const showOne = (role: Role = 'lead', fahrenheit = false) => {
  const me = meAs(role);
  return renderPage(<CoatingPage />, {
    me: fahrenheit ? { ...me, account: { ...me.account, temperatureUnit: 'F' } } : me,
    at: `/shop/coatings/${coatingId}`,
    pattern: '/shop/coatings/:coatingId',
    now,
  });
};
const answers = (coating: CoatingDetail = sampleCoating, touched: object = same) => ({
  [`GET ${one}`]: { body: coating },
  [`GET ${one}/touched`]: { body: touched },
});

describe('the list', () => {
  const survey = `GET ${root}/coating-survey`;
  it('shows kind, key figures, where it is used and whether its PDF is there', async () => {
    fakeApi({ [survey]: { body: { coatings: [sampleCoating] } } });
    showList();
    const row = (await screen.findByRole('link', { name: 'Medium-solid clear' })).closest('li');
    expect(row).toHaveTextContent('Clear');
    expect(row).toHaveTextContent('2 coats, 10 min between');
    expect(row).toHaveTextContent('30 min at 60 °C metal or 12 h in air');
    expect(row).toHaveTextContent('in 1 process sheet');
    expect(row).toHaveTextContent('no PDF');
    expect(screen.getByRole('note', { name: 'Caution' })).toHaveTextContent('isocyanates');
    await expectAccessible();
  });
  it('shows the retired ones when asked, and keeps that in the address', async () => {
    const { sent } = fakeApi({
      [survey]: ({ query }) => ({ body: { coatings: query.get('retired') === 'yes' ? [] : [sampleCoating] } }),
    });
    const { router } = showList();
    await userEvent.click(await screen.findByRole('radio', { name: 'Retired' }));
    expect(await screen.findByText('No data sheet is retired')).toBeVisible();
    expect(router.state.location.search).toBe('?retired=yes');
    expect(sent.map(({ query }) => query.get('retired'))).toEqual(['no', 'yes']);
  });
  it('offers the first step where it is empty, only to who may take it', async () => {
    fakeApi({ [survey]: { body: { coatings: [] } } });
    const { unmount } = showList();
    await screen.findByText('No data sheet yet');
    expect(screen.getAllByRole('link', { name: 'New data sheet' })).toHaveLength(2);
    unmount();
    showList('painter');
    expect(await screen.findByText('No data sheet yet')).toBeVisible();
    expect(screen.queryByRole('link', { name: 'New data sheet' })).toBeNull();
    expect(screen.queryByRole('button', { name: /Import/ })).toBeNull();
  });
  it('says so where it cannot be loaded, and loads again', async () => {
    let tries = 0;
    fakeApi({
      [survey]: () => (tries++ === 0 ? apiError(503, 'unavailable') : { body: { coatings: [sampleCoating] } }),
    });
    showList();
    await userEvent.click(await screen.findByRole('button', { name: 'Try again' }));
    expect(await screen.findByRole('link', { name: 'Medium-solid clear' })).toBeVisible();
  });
});

describe('a data sheet', () => {
  it('is changed with warnings while typing, drawn, and saved with its version', async () => {
    const saved = {
      ...sampleCoating,
      version: 4,
      sheet: { ...sampleCoating.sheet, coats: { from: 2, to: 4 }, potLife: 20 },
    };
    const { sent } = fakeApi({ ...answers(), [`PATCH ${one}`]: { body: saved } });
    showOne();
    const pot = await screen.findByLabelText(/^Pot life/);
    await userEvent.clear(screen.getByLabelText('Coats, at most'));
    await userEvent.type(screen.getByLabelText('Coats, at most'), '4');
    await userEvent.clear(pot);
    await userEvent.type(pot, '20');
    expect(screen.getByRole('status', { name: 'Worth a second look' })).toHaveTextContent(
      'Pot life shorter than its coats: 20 min, but the last coat begins 30 min after',
    );
    expect(screen.getByRole('region', { name: 'What comes of it' })).toHaveTextContent('4 coats with 10 min between');
    await expectAccessible();
    await userEvent.click(screen.getByRole('button', { name: 'Save data sheet' }));
    expect(await screen.findByText('All is saved.')).toBeVisible();
    expect(sent.find(({ method }) => method === 'PATCH')?.body).toEqual({
      version: 3,
      name: saved.name,
      kind: 'clear',
      sheet: saved.sheet,
    });
  });

  it('is typed in Fahrenheit by who reads it so, and stored in Celsius', async () => {
    const { sent } = fakeApi({ ...answers(), [`PATCH ${one}`]: { body: { ...sampleCoating, version: 4 } } });
    showOne('lead', true);
    const at = await screen.findByLabelText(/^Bake at, °F/);
    expect(at).toHaveValue('140');
    await userEvent.clear(at);
    await userEvent.type(at, '149');
    await userEvent.click(screen.getByRole('button', { name: 'Save data sheet' }));
    await waitFor(() =>
      expect(sent.find(({ method }) => method === 'PATCH')?.body).toMatchObject({ sheet: { bake: { celsius: 65 } } }),
    );
  });

  it('says what is wrong at its field and sends nothing', async () => {
    const { sent } = fakeApi(answers());
    showOne();
    const limit = await screen.findByLabelText(/^Film never hotter than/);
    await userEvent.type(limit, '50');
    expect(screen.getByLabelText(/^Bake at/)).toHaveAccessibleDescription(/Hotter than the sheet’s own limit/);
    await userEvent.click(screen.getByRole('button', { name: 'Save data sheet' }));
    expect(sent.some(({ method }) => method === 'PATCH')).toBe(false);
    expect(screen.getByText('The drawing comes back once every figure makes sense.')).toBeVisible();
  });

  it('changed by somebody else meanwhile: what was typed stays, theirs is said, the next save goes over it', async () => {
    const theirs = { ...sampleCoating, version: 4, sheet: { ...sampleCoating.sheet, flashBeforeHeat: 18 } };
    let tries = 0;
    const { sent } = fakeApi({
      ...answers(),
      [`PATCH ${one}`]: () =>
        tries++ === 0
          ? apiError(409, 'stale', { current: theirs })
          : { body: { ...theirs, version: 5, name: 'Clear' } },
      [`GET ${one}`]: () => ({ body: tries === 0 ? sampleCoating : theirs }),
    });
    showOne();
    const name = await screen.findByLabelText('Name');
    await userEvent.clear(name);
    await userEvent.type(name, 'Clear');
    await userEvent.click(screen.getByRole('button', { name: 'Save data sheet' }));
    expect(await screen.findByText('Theirs: flash before heat 18.')).toBeVisible();
    expect(name).toHaveValue('Clear');
    await userEvent.click(screen.getByRole('button', { name: 'Save data sheet' }));
    await waitFor(() => expect(tries).toBe(2));
    expect(
      sent.filter(({ method }) => method === 'PATCH').map(({ body }) => (body as { version: number }).version),
    ).toEqual([3, 4]);
  });

  it('half typed is still there after a reload, and can be taken back', async () => {
    fakeApi(answers());
    const { unmount } = showOne();
    await userEvent.type(await screen.findByLabelText('Flash between coats, min'), '5');
    dispatchEvent(new Event('pagehide'));
    unmount();
    showOne();
    expect(await screen.findByLabelText('Flash between coats, min')).toHaveValue('105');
    await userEvent.click(screen.getByRole('button', { name: 'Take back' }));
    expect(screen.getByLabelText('Flash between coats, min')).toHaveValue('10');
  });

  it('is only read by a painter', async () => {
    fakeApi(answers(sampleCoating, sampleTouched));
    showOne('painter');
    expect(await screen.findByLabelText('Flash between coats, min')).toBeDisabled();
    expect(screen.queryByRole('button', { name: /Save|Retire|Re-time/ })).toBeNull();
    expect(screen.queryByLabelText(/PDF/)).toBeNull();
  });

  it('is retired and brought back', async () => {
    const retired = { ...sampleCoating, version: 4, retiredAt: '2026-03-12T08:31:00.000Z' };
    let state: CoatingDetail = sampleCoating;
    const { sent } = fakeApi({
      ...answers(),
      [`GET ${one}`]: () => ({ body: state }),
      [`PATCH ${one}`]: ({ body }) => {
        state = (body as { retired: boolean }).retired ? retired : { ...sampleCoating, version: 5 };
        return { body: state };
      },
    });
    showOne();
    await userEvent.click(await screen.findByRole('button', { name: 'Retire' }));
    const dialog = await screen.findByRole('dialog');
    expect(dialog).toHaveTextContent('These process sheets name it and keep its times: Bumper.');
    await userEvent.click(within(dialog).getByRole('button', { name: 'Retire it' }));
    await userEvent.click(await screen.findByRole('button', { name: 'Bring back' }));
    expect(await screen.findByRole('button', { name: 'Retire' })).toBeVisible();
    expect(sent.filter(({ method }) => method === 'PATCH').map(({ body }) => body)).toEqual([
      { version: 3, retired: true },
      { version: 4, retired: false },
    ]);
  });
});

describe('what it touches', () => {
  it('is re-timed only where it is ticked', async () => {
    const [first, ...others] = sampleTouched.jobs;
    const now = { ...first, differs: false };
    const after = { ...sampleTouched, sheets: [], jobs: [now, ...others] };
    let told = false;
    const { sent } = fakeApi({
      ...answers(),
      [`GET ${one}/touched`]: () => ({ body: told ? after : sampleTouched }),
      [`POST ${one}/retime`]: () => {
        told = true;
        return { body: { sheets: 1, jobs: 1, bookedStages: 1, touched: after } };
      },
    });
    showOne();
    const panel = await screen.findByRole('region', { name: 'What it touches' });
    await userEvent.click(await within(panel).findByRole('checkbox', { name: '2402 Rear bumper' }));
    expect(panel).toHaveTextContent('Clear, Sprayed: 26 min → 31 min');
    expect(within(panel).queryByRole('checkbox', { name: 'Wheels' })).toBeNull();
    await expectAccessible();
    await userEvent.click(within(panel).getByRole('button', { name: 'Re-time these (2)' }));
    await waitFor(() =>
      expect(sent.find(({ method }) => method === 'POST')?.body).toEqual({
        version: 3,
        sheetIds: [touchedIds.bumper],
        jobIds: [touchedIds.front],
      }),
    );
    expect(await within(panel).findByText('Re-timed: 1 process sheet, 1 job.')).toBeVisible();
    expect(panel).toHaveTextContent('One booked stage has other times now than the posted plan.');
    // The one that was left out still differs, and stays left out.
    expect(await within(panel).findByRole('button', { name: 'Re-time these (0)' })).toBeDisabled();
  });
});

describe('the maker’s PDF', () => {
  const file = (bytes: number) => new File([new Uint8Array(bytes)], 'clear.pdf', { type: 'application/pdf' });
  it('is attached, and a file that is none of the kind is told', async () => {
    const document = {
      id: touchedIds.front,
      name: 'clear.pdf',
      bytes: 2048,
      mime: 'application/pdf',
      at: '2026-03-12T08:00:00.000Z',
      by: 'Imke Tiedemann',
    };
    let tries = 0;
    const { sent } = fakeApi({
      ...answers(),
      [`POST ${one}/document`]: () =>
        tries++ === 0 ? apiError(415, 'wrong-kind', { fields: [] }) : { body: { ...sampleCoating, document } },
    });
    showOne();
    const input = await screen.findByLabelText('Attach a PDF');
    await userEvent.upload(input, file(10));
    expect(await screen.findByText(/This kind of file is not taken here/)).toBeVisible();
    await userEvent.upload(screen.getByLabelText('Attach a PDF'), file(10));
    const link = await screen.findByRole('link', { name: /clear\.pdf/ });
    expect(link).toHaveAttribute('href', `${root}/attachments/${document.id}?open=1`);
    const posts = sent.filter(({ method }) => method === 'POST');
    expect(posts.every(({ headers }) => headers.get('idempotency-key') && !headers.get('content-type'))).toBe(true);
    await expectAccessible();
  });
  it('too large is told before it is sent', async () => {
    const { sent } = fakeApi(answers());
    showOne();
    await userEvent.upload(await screen.findByLabelText('Attach a PDF'), file(10_485_761));
    expect(await screen.findByText(/larger than 10 MB/)).toBeVisible();
    expect(sent.some(({ method }) => method === 'POST')).toBe(false);
  });
});

describe('a new one', () => {
  it('begins with common practice, marked as such, and is made under an id of its own', async () => {
    const { sent } = fakeApi({
      [`POST ${root}/coatings`]: ({ body }) => ({ body: { ...sampleCoating, ...(body as object) } }),
    });
    renderPage(<NewPage />, {
      me: meAs('lead'),
      at: '/shop/coatings/new',
      others: [{ path: '/shop/coatings/:coatingId', element: <p>its page</p> }],
    });
    await userEvent.click(await screen.findByRole('button', { name: 'Keep data sheet' }));
    expect(screen.getByLabelText('Name')).toHaveAccessibleDescription(/Enter a name/);
    await userEvent.type(screen.getByLabelText('Name'), 'Quick primer');
    await userEvent.selectOptions(screen.getByLabelText('Kind'), 'Primer surfacer');
    expect(screen.getByText('Primer surfacer: common practice, check against the maker’s sheet')).toBeVisible();
    await userEvent.click(screen.getByRole('button', { name: 'Fill what is empty with these' }));
    expect(screen.getByLabelText(/^Bake, min/)).toHaveValue('30');
    await userEvent.click(screen.getByRole('button', { name: 'Keep data sheet' }));
    expect(await screen.findByText('its page')).toBeVisible();
    const body = sent.find(({ method }) => method === 'POST')?.body;
    expect(body).toMatchObject({ name: 'Quick primer', kind: 'primer', sheet: { bake: { minutes: 30, celsius: 60 } } });
  });
});
