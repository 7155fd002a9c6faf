import { act, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { benchView } from '#contracts/bench.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi, type Sent } from '#src/testing/fake-api.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as BenchPage } from './bench-page.tsx';
import { sampleBench } from './testing/sample-bench.ts';

const bench = benchView.parse(sampleBench());
const address = `GET /api/shops/${shopId}/bench`;
const [, running, next] = bench.stages;
const deed = (stage: { id: string } | undefined, what: string) =>
  `POST /api/shops/${shopId}/stages/${stage?.id}/${what}`;
const now = () => Date.parse('2026-03-12T08:31:20Z');
// Each account has a queue of taps of its own, kept beyond the page.
let accounts = 0;
const painter = () => {
  const me = meAs('painter');
  return { ...me, account: { ...me.account, id: `${me.account.id.slice(0, -4)}${String(1000 + accounts++)}` } };
};
const show = (me = painter(), at = '/bench') => renderPage(<BenchPage />, { at, me, now });
const writes = (sent: Sent[]) => sent.filter((one) => one.method === 'POST');
const never = () => new Promise<never>(() => {});

// The device's clock stands still, and wrong: an hour behind the server's.
const device = Date.parse('2026-03-12T07:31:20Z');
beforeEach(() => {
  vi.useFakeTimers({ toFake: ['Date'], now: device });
});
afterEach(() => {
  vi.useRealTimers();
});

describe('the bench', () => {
  it('shows what runs with its clock by the server’s time, and what is next with its window', async () => {
    fakeApi({ [address]: { body: bench } });
    show();
    const nowCard = within(await screen.findByRole('region', { name: 'Now: 2418 Base and clear' }));
    // Begun at 7:57 UTC, 2 min late: its first flash ends at 8:32 UTC, 9:32 in Berlin; it is 9:31:20 there.
    expect(nowCard.getByText('flash until 9:32')).toBeVisible();
    expect(nowCard.getByRole('timer')).toHaveTextContent(/^0:40$/);
    expect(nowCard.getByText(/Together with Mirror caps/)).toBeVisible();
    const nextCard = within(screen.getByRole('region', { name: 'Next: 2423 Prime' }));
    expect(nextCard.getByText('10:20')).toBeVisible();
    expect(nextCard.getByText(/Too early: wait until 9:40, 9 min more/)).toBeVisible();
    await expectAccessible();
  });

  it('is right again at once when the phone wakes', async () => {
    fakeApi({ [address]: { body: bench } });
    show();
    const nowCard = within(await screen.findByRole('region', { name: 'Now: 2418 Base and clear' }));
    vi.setSystemTime(device + 5 * 60_000);
    act(() => void document.dispatchEvent(new Event('visibilitychange')));
    // 9:36:20: the second coat runs to 9:42.
    expect(nowCard.getByText('spray until 9:42')).toBeVisible();
    expect(nowCard.getByRole('timer')).toHaveTextContent(/^5:40$/);
    vi.setSystemTime(device + 60 * 60_000);
    act(() => void document.dispatchEvent(new Event('visibilitychange')));
    expect(nowCard.getByText('Time is up since 10:07')).toBeVisible();
    expect(nowCard.getByRole('timer')).toHaveTextContent(/^\+24:20$/);
  });

  it('shows a tap at once as sent, and refuses with the reason in words', async () => {
    let answer: (value: ReturnType<typeof apiError>) => void = () => {};
    const { sent } = fakeApi({
      [address]: { body: bench },
      [deed(next, 'start')]: () => new Promise((resolve) => (answer = resolve)),
    });
    show();
    await userEvent.click(await screen.findByRole('button', { name: 'Start: 2423 Prime' }));
    const card = await screen.findByRole('region', { name: 'Now: 2423 Prime' });
    expect(card).toHaveTextContent('Sending…');
    expect(writes(sent).map((one) => one.body)).toEqual([{ version: 1 }]);
    expect(writes(sent)[0]?.headers.get('idempotency-key')).toMatch(/^[0-9a-f-]{36}$/);
    const reason = {
      code: 'previous-not-done',
      rule: 1,
      stageId: next?.id,
      ids: ['x'],
      names: ['Clean and scuff'],
      at: [],
      minutes: [],
    };
    answer(apiError(422, 'refused', { reasons: [reason] }));
    const note = await screen.findByRole('alert');
    expect(note).toHaveTextContent('Start of 2423 Prime was not taken.');
    expect(note).toHaveTextContent('Clean and scuff comes before it and is not done.');
    expect(screen.getByRole('region', { name: 'Next: 2423 Prime' })).toBeVisible();
    await expectAccessible();
  });

  it('keeps a tap that found no connection, says so, and holds it over a reload', async () => {
    fakeApi({ [address]: { body: bench }, [deed(running, 'finish')]: 'unreachable' });
    show();
    await userEvent.click(await screen.findByRole('button', { name: 'Done: 2418 Base and clear' }));
    expect(await screen.findByText(/Your tap is kept and sent by itself/)).toBeVisible();
    expect(JSON.stringify({ ...localStorage })).toContain(running?.id);
  });

  it('counts a tap done when the server has it', async () => {
    let isDone = false;
    fakeApi({
      [address]: () => ({
        body: isDone
          ? {
              ...bench,
              stages: bench.stages.map((s) => (s.id === running?.id ? { ...s, state: 'done', version: 2 } : s)),
            }
          : bench,
      }),
      [deed(running, 'finish')]: () => {
        isDone = true;
        return { body: { version: 2 } };
      },
    });
    show();
    await userEvent.click(await screen.findByRole('button', { name: 'Done: 2418 Base and clear' }));
    await waitFor(() => expect(screen.queryByText('Sending…')).toBeNull());
    expect(within(screen.getByRole('region', { name: 'Done' })).getByText('Base and clear')).toBeVisible();
    expect(localStorage).toHaveLength(0);
  });

  it('says that nothing is booked', async () => {
    fakeApi({ [address]: { body: { ...bench, stages: [] } } });
    show();
    expect(await screen.findByText('Nothing booked for you today')).toBeVisible();
    await expectAccessible();
  });

  it('goes to other days by the arrows, where nothing can be tapped', async () => {
    const { sent } = fakeApi({
      [address]: ({ query }: Sent) => ({ body: { ...bench, day: query.get('day') ?? bench.day } }),
    });
    const { router } = show();
    await screen.findByRole('region', { name: /Now/ });
    await userEvent.click(screen.getByRole('button', { name: 'Day after' }));
    await waitFor(() => expect(sent.at(-1)?.query.get('day')).toBe('2026-03-13'));
    expect(router.state.location.search).toBe('?day=2026-03-13');
    await screen.findByRole('region', { name: /Now/ });
    expect(screen.queryByRole('button', { name: /Start|Done:/ })).toBeNull();
    await userEvent.click(screen.getByRole('button', { name: 'Back to today' }));
    expect(router.state.location.search).toBe('');
  });

  it('says how old what it shows is, when it cannot ask again', async () => {
    let isBroken = false;
    fakeApi({ [address]: () => (isBroken ? 'unreachable' : { body: bench }) });
    const { client } = show();
    await screen.findByRole('region', { name: /Now/ });
    isBroken = true;
    await client.invalidateQueries();
    expect(await screen.findByText(/What you see is from .* ago\./)).toBeVisible();
    expect(screen.getByRole('region', { name: /Now/ })).toBeVisible();
  });

  it('lets leads choose another person', async () => {
    const people = [{ id: '01958000-0006-7000-8000-000000000002', name: 'Rafe Moss' }];
    const { sent } = fakeApi({
      [address]: { body: bench },
      [`GET /api/shops/${shopId}/day`]: { status: 200, body: dayWith(people) },
    });
    show({ ...meAs('lead'), account: { ...painter().account } });
    await userEvent.selectOptions(await screen.findByRole('combobox', { name: 'Whose bench' }), 'Rafe Moss');
    await waitFor(() => expect(sent.at(-1)?.query.get('personId')).toBe(people[0]?.id));
  });

  it('has its shape before its contents', () => {
    fakeApi({ [address]: never });
    show();
    expect(screen.getByRole('status')).toHaveTextContent('Loading the bench');
  });
});

const dayWith = (people: { id: string; name: string }[]) => ({
  span: { from: '2026-03-11T23:00:00.000Z', to: '2026-03-12T23:00:00.000Z' },
  serverTime: bench.serverTime,
  seq: 1,
  shown: 'posted',
  posted: { number: 1, at: null, by: null, changedAir: [] },
  air: [],
  draft: null,
  open: [],
  rows: people.map(({ id, name }) => ({
    id,
    kind: 'person',
    name,
    units: null,
    zone: null,
    kilowatts: null,
    circuitId: null,
    closed: [],
    working: [],
  })),
  circuits: [],
  bars: [],
  unplaced: [],
  run: null,
});
