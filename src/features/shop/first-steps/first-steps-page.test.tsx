import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { FirstStep, FirstSteps } from '#contracts/first-steps.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as FirstStepsPage } from './first-steps-page.tsx';

afterEach(() => vi.unstubAllGlobals());
const all: FirstStep[] = ['hours', 'places', 'people', 'sheets', 'job'];
const state = (done: FirstStep[], more: Partial<FirstSteps> = {}): { body: FirstSteps } => ({
  body: {
    steps: all.map((step) => ({ step, done: done.includes(step) })),
    isDemo: false,
    resetting: false,
    has: { openings: 1, booths: 1, stations: 3, lamps: 2, people: 2, coatings: 6, sheets: 7, jobs: 1 },
    starter: [
      { key: 'bumper', name: 'Plastic bumper', summary: 'Heated and feathered.' },
      { key: 'wheels', name: 'Set of wheels', summary: 'Off the vehicle.' },
    ],
    ...more,
  },
});
const read = `GET /api/shops/${shopId}/first-steps`;
const take = (step: FirstStep) => `POST /api/shops/${shopId}/first-steps/${step}`;
const session = { 'GET /api/session': { body: meAs('owner') } };
const show = (at = '/shop') => renderPage(<FirstStepsPage />, { me: meAs('owner'), at });
const posted = (sent: ReturnType<typeof fakeApi>['sent']) => sent.find(({ method }) => method === 'POST')?.body;

describe('the first steps', () => {
  it('take the hours as they are filled in, and open the next', async () => {
    let done: FirstStep[] = [];
    const { sent } = fakeApi({
      ...session,
      [read]: () => state(done),
      [take('hours')]: () => {
        done = ['hours'];
        return state(done);
      },
    });
    show();
    await screen.findByText('0 of 5 done');
    await expectAccessible();
    await userEvent.click(screen.getByRole('button', { name: 'Take these' }));
    await screen.findByText('1 of 5 done');
    expect(posted(sent)).toEqual({
      timeZone: 'Europe/Berlin',
      days: ['MO', 'TU', 'WE', 'TH', 'FR'],
      from: '07:00',
      to: '18:00',
    });
    expect(await screen.findByText(/Purge before each bake: 3 min/)).toBeVisible();
  });

  it('say what follows of a booth, and what cannot be', async () => {
    fakeApi({ ...session, [read]: state(['hours']) });
    show();
    const flow = await screen.findByLabelText('Air flow (m³/h)');
    // International Fire Code 2018, ch. 24: 4 x 96 m3 / 5,000 m3/h = 4.608 min, in whole minutes.
    await userEvent.clear(flow);
    await userEvent.type(flow, '5000');
    expect(screen.getByText(/Purge before each bake: 5 min/)).toBeVisible();
    await userEvent.clear(flow);
    expect(screen.getByText(/no bake is planned in it/)).toBeVisible();
    await userEvent.clear(screen.getByLabelText('Spray booths'));
    await userEvent.click(screen.getByRole('button', { name: 'Take these' }));
    expect(screen.getByLabelText('Spray booths')).toBeInvalid();
    await expectAccessible();
  });

  it('ask when painters were trained, or to be told that the shop only warns', async () => {
    const { sent } = fakeApi({ ...session, [read]: state(['hours', 'places']), [take('people')]: state(all) });
    show();
    await userEvent.click(await screen.findByRole('button', { name: 'Take these' }));
    expect(await screen.findByRole('alert')).toHaveTextContent('Enter when each painter was last trained');
    expect(posted(sent)).toBeUndefined();
    await userEvent.click(screen.getByRole('checkbox', { name: /Training dates come later/ }));
    await userEvent.click(screen.getAllByRole('checkbox', { name: 'This is me' })[0] as HTMLElement);
    await expectAccessible();
    await userEvent.click(screen.getByRole('button', { name: 'Take these' }));
    await waitFor(() => expect(posted(sent)).toBeDefined());
    expect(posted(sent)).toMatchObject({
      onlyWarn: true,
      from: '07:00',
      people: [
        { name: 'Painter 1', skills: ['paint', 'prep'], sprayTrainedOn: null, isMe: true },
        { name: 'Prepper 1', isMe: false },
      ],
    });
  });

  it('keep what was entered where a step is refused', async () => {
    fakeApi({ ...session, [read]: state(['hours', 'places', 'people']), [take('sheets')]: 'unreachable' });
    show();
    await userEvent.click(await screen.findByRole('checkbox', { name: /Set of wheels/ }));
    await userEvent.click(screen.getByRole('button', { name: 'Take these' }));
    expect(await screen.findByRole('alert')).toHaveTextContent('What you entered is kept.');
    expect(screen.getByRole('checkbox', { name: /Set of wheels/ })).not.toBeChecked();
    expect(screen.getByText(/Check every figure/)).toBeVisible();
  });

  it('lead to the pages once all is done, and reset only a demo', async () => {
    fakeApi({ ...session, [read]: state(all) });
    const { unmount } = show();
    await screen.findByText('5 of 5 done');
    expect(screen.getByRole('link', { name: '1 booth, 3 stations, 2 lamps' })).toHaveAttribute('href', '/shop/places');
    expect(screen.queryByRole('button', { name: 'Reset the demo' })).not.toBeInTheDocument();
    unmount();

    let asked = false;
    const { sent } = fakeApi({
      ...session,
      [read]: () => state(all, { isDemo: true, resetting: asked }),
      [`POST /api/shops/${shopId}/reset-demo`]: () => {
        asked = true;
        return { status: 204 };
      },
    });
    show();
    await userEvent.click(await screen.findByRole('button', { name: 'Reset the demo' }));
    const dialog = await screen.findByRole('dialog');
    await userEvent.type(within(dialog).getByLabelText(/Type/), 'yes');
    await userEvent.click(within(dialog).getByRole('button', { name: 'Reset the demo' }));
    expect(within(dialog).getByLabelText(/Type/)).toBeInvalid();
    expect(posted(sent)).toBeUndefined();
    await expectAccessible(dialog);
    await userEvent.clear(within(dialog).getByLabelText(/Type/));
    await userEvent.type(within(dialog).getByLabelText(/Type/), 'reset the demo');
    await userEvent.click(within(dialog).getByRole('button', { name: 'Reset the demo' }));
    expect(await screen.findByRole('progressbar', { name: 'The demo is being put back' })).toBeVisible();
    expect(posted(sent)).toEqual({ words: 'reset the demo' });
  });

  it('say so where they cannot be loaded, and are the owner’s', async () => {
    fakeApi({ [read]: apiError(500, 'internal') });
    const { unmount } = show();
    expect(await screen.findByRole('alert')).toHaveTextContent('The steps could not be loaded.');
    unmount();
    renderPage(<FirstStepsPage />, { me: meAs('painter'), at: '/shop' });
    expect(screen.getByText(/Owners set up the shop/)).toBeVisible();
  });
});
