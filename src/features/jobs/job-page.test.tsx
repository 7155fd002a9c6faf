import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it } from 'vitest';
import { job as contract, type Job } from '#contracts/jobs.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi, type Sent } from '#src/testing/fake-api.ts';
import { stubWidth } from '#src/testing/media.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as JobPage } from './job-page.tsx';
import { sampleJob } from './testing/sample-jobs.ts';

const job = contract.parse(sampleJob());
const path = `/api/shops/${shopId}/jobs/${job.id}`;
const show = (role: 'lead' | 'painter' = 'lead') =>
  renderPage(<JobPage />, {
    at: `/jobs/${job.id}`,
    pattern: '/jobs/:jobId',
    me: meAs(role),
    now: () => Date.parse('2026-03-12T08:31:00Z'),
  });
const writes = (sent: Sent[]) => sent.filter((one) => one.method !== 'GET').map((one) => one.body);

beforeEach(() => stubWidth(1440));

describe('a job’s page', () => {
  it('shows the chain with booking, window, ways and what happened', async () => {
    fakeApi({ [`GET ${path}`]: { body: job } });
    show();
    const chain = within(await screen.findByRole('region', { name: /Stages/ }));
    const stage = (title: string) => chain.getByRole('heading', { name: title }).closest('li');
    expect(stage('Clean and feather')).toHaveTextContent(/Done.*today 7:30 to 8:20.*Prep 2 · Imke Vonk/);
    expect(stage('Clean and feather')).toHaveTextContent('Started today 7:33, done 8:24 · 4 min later than planned');
    expect(stage('Cure primer')).toHaveTextContent(/Running/);
    expect(stage('Denib and polish')).toHaveTextContent('Not planned yet');
    expect(chain.getAllByRole('note')).toHaveLength(1);
    await expectAccessible();
  });

  it('says history in words', async () => {
    fakeApi({ [`GET ${path}`]: { body: job } });
    show();
    const history = within(await screen.findByRole('region', { name: 'History' }));
    expect(history.getByText('Changed the promise')).toBeVisible();
    expect(history.getByText('From tomorrow 17:00 to today 17:00')).toBeVisible();
  });

  it('shows the heat limit of the vehicle with its caution', async () => {
    fakeApi({ [`GET ${path}`]: { body: job } });
    show();
    const part = within(await screen.findByRole('region', { name: 'Part' }));
    expect(part.getByText(/at most 60 °C, 45 min over all bakes/)).toBeVisible();
    expect(part.getByRole('note', { name: 'Caution' })).toBeVisible();
  });

  it('marks ways that are too hot for the vehicle', async () => {
    // 120 F and so under the 60 C of the sample's booth bake.
    fakeApi({ [`GET ${path}`]: { body: { ...job, heatLimitCelsius: null } } });
    show();
    const cure = (await screen.findByRole('heading', { name: 'Bake' })).closest('li');
    expect(cure).toHaveTextContent('Booth bake, 55 min, 60 °Cabove the heat limit');
  });

  it('explains what somebody else changed, and saves only the own field over it when told to', async () => {
    const theirs: Job = { ...job, version: 5, promiseAt: '2026-03-13T10:00:00.000Z' };
    const { sent } = fakeApi({
      [`GET ${path}`]: { body: job },
      [`PATCH ${path}`]: ({ body }: Sent) =>
        (body as { version: number }).version === 4
          ? apiError(409, 'stale', { current: theirs })
          : { body: { ...theirs, version: 6, notes: 'Mind the inner edge' } },
    });
    show();
    await userEvent.click(await screen.findByRole('button', { name: 'Edit notes' }));
    const box = screen.getByRole('textbox', { name: 'Notes' });
    await userEvent.clear(box);
    await userEvent.type(box, 'Mind the inner edge');
    await userEvent.click(screen.getByRole('button', { name: 'Save' }));
    const note = await screen.findByRole('alert');
    expect(note).toHaveTextContent('Rafe Moss changed this job while you were typing. Yours is not saved.');
    expect(note).toHaveTextContent('promise: from today 17:00 to tomorrow 11:00');
    await expectAccessible();
    await userEvent.click(within(note).getByRole('button', { name: 'Save mine as well' }));
    expect(await screen.findByText('Mind the inner edge')).toBeVisible();
    expect(writes(sent)).toEqual([
      { version: 4, notes: 'Mind the inner edge' },
      { version: 5, notes: 'Mind the inner edge' },
    ]);
  });

  it('changes promise and weight in a form, sending only those', async () => {
    const { sent } = fakeApi({ [`GET ${path}`]: { body: job }, [`PATCH ${path}`]: { body: { ...job, version: 5 } } });
    show();
    await userEvent.click(await screen.findByRole('button', { name: 'Change' }));
    const dialog = within(screen.getByRole('dialog', { name: 'Change job 2418' }));
    await userEvent.click(dialog.getByRole('radio', { name: 'Firm' }));
    const time = dialog.getByRole('textbox', { name: 'Promise, time' });
    await userEvent.clear(time);
    await userEvent.type(time, '1815');
    await expectAccessible();
    await userEvent.click(dialog.getByRole('button', { name: 'Save' }));
    await waitFor(() => expect(screen.queryByRole('dialog')).toBeNull());
    expect(writes(sent)).toEqual([{ version: 4, weight: 6, promiseAt: '2026-03-12T17:15:00.000Z' }]);
  });

  it('withdraws after asking once by name, and says why when it may not', async () => {
    const reason = {
      code: 'stage-running',
      rule: null,
      stageId: null,
      ids: [],
      names: ['Tailgate, electric'],
      at: [],
      minutes: [],
    };
    const { sent } = fakeApi({
      [`GET ${path}`]: { body: job },
      [`POST ${path}/withdraw`]: apiError(422, 'refused', { reasons: [reason] }),
    });
    show();
    await userEvent.click(await screen.findByRole('button', { name: 'Withdraw' }));
    expect(screen.getByRole('dialog')).toHaveAccessibleName('Withdraw job 2418, Tailgate, electric?');
    expect(writes(sent)).toEqual([]);
    await userEvent.click(screen.getByRole('button', { name: 'Withdraw the job' }));
    expect(await screen.findByText(/A stage of Tailgate, electric is running\. Finish it first\./)).toBeVisible();
    expect(writes(sent)).toEqual([{ version: 4 }]);
  });

  it('offers painters nothing that would be refused', async () => {
    fakeApi({ [`GET ${path}`]: { body: job } });
    show('painter');
    await screen.findByRole('region', { name: 'History' });
    expect(screen.queryByRole('button', { name: /Change|Withdraw|Edit/ })).toBeNull();
  });

  it('says that an unknown job is not here', async () => {
    fakeApi({ [`GET ${path}`]: apiError(404, 'not-found') });
    show();
    expect(await screen.findByRole('alert')).toHaveTextContent('The job could not be loaded. It is not here.');
    await expectAccessible();
  });
});
