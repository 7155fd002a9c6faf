import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it } from 'vitest';
import { newJob } from '#contracts/jobs.ts';
import type { SheetBody } from '#contracts/sheets.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi, type Sent } from '#src/testing/fake-api.ts';
import { stubWidth } from '#src/testing/media.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as NewJobPage } from './new-job-page.tsx';
import { sampleJob } from './testing/sample-jobs.ts';
import { bumperSheet, tailgateSheet } from './testing/sample-sheet.ts';

const sheets = { [`GET /api/shops/${shopId}/process-sheets`]: { body: { sheets: [tailgateSheet, bumperSheet] } } };
const create = `POST /api/shops/${shopId}/jobs`;
const others = [{ path: '/jobs/:jobId', element: <p>The job&rsquo;s page</p> }];
const show = () => renderPage(<NewJobPage />, { at: '/jobs/new', me: meAs('office'), others });
const withExtraCoats = (body: SheetBody): SheetBody => ({
  ...body,
  options: [...body.options, { key: 'coats', label: 'Extra coats', on: false, most: 3 }],
  stages: body.stages.map((stage) =>
    stage.key === 'colour'
      ? {
          ...stage,
          ways: stage.ways.map((way) => ({
            ...way,
            phases: [
              ...way.phases,
              { kind: 'spray' as const, minutes: 10, attendance: 'hands' as const, perExtraCoat: 'coats' },
            ],
          })),
        }
      : stage,
  ),
});
const made = (sent: Sent[]) => sent.filter((one) => one.method === 'POST').map((one) => newJob.parse(one.body));

beforeEach(() => stubWidth(1440));

describe('a new job', () => {
  it('comes from a sheet and a title; everything else may stay', async () => {
    const { sent } = fakeApi({ ...sheets, [create]: { body: sampleJob() } });
    show();
    await userEvent.click(await screen.findByRole('radio', { name: /Bumper cover, new/ }));
    expect(screen.getByRole('textbox', { name: 'Part 1' })).toHaveValue('Bumper cover');
    await userEvent.type(screen.getByRole('textbox', { name: 'Title' }), 'Front cover');
    await expectAccessible();
    await userEvent.click(screen.getByRole('button', { name: 'Make the job' }));
    expect(await screen.findByText('The job’s page')).toBeVisible();
    expect(made(sent)).toMatchObject([
      { sheetId: bumperSheet.id, title: 'Front cover', parts: [{ name: 'Bumper cover', units: 3 }], promiseAt: null },
    ]);
  });

  it('shows the stages that the options leave', async () => {
    fakeApi(sheets);
    show();
    await userEvent.click(await screen.findByRole('radio', { name: /Tailgate, repaired/ }));
    const stages = screen.getByRole('region', { name: 'Stages' });
    expect(
      within(stages)
        .getAllByRole('listitem')
        .filter((li) => li.parentElement?.tagName === 'OL'),
    ).toHaveLength(7);
    await userEvent.click(screen.getByRole('checkbox', { name: 'Filler to shape first' }));
    expect(within(stages).getByText('Fill and shape')).toBeVisible();
    expect(within(stages).getByText(/8 stages, at least/)).toBeVisible();
  });

  it('counts what can be chosen several times, and shows it in the stages', async () => {
    const counted = { ...tailgateSheet, body: withExtraCoats(tailgateSheet.body) };
    const { sent } = fakeApi({
      [`GET /api/shops/${shopId}/process-sheets`]: { body: { sheets: [counted] } },
      [create]: { body: sampleJob() },
    });
    show();
    await userEvent.click(await screen.findByRole('radio', { name: /Tailgate, repaired/ }));
    const stages = screen.getByRole('region', { name: 'Stages' });
    const before = within(stages).getByRole('status').textContent;
    await userEvent.selectOptions(screen.getByRole('combobox', { name: 'Extra coats' }), '2');
    expect(within(stages).getByRole('status').textContent).not.toBe(before);
    await userEvent.type(screen.getByRole('textbox', { name: 'Title' }), 'Tailgate');
    await userEvent.click(screen.getByRole('button', { name: 'Make the job' }));
    await waitFor(() => expect(made(sent)).toMatchObject([{ options: ['polish', 'coats', 'coats'] }]));
  });

  it('marks what is missing at its field and sends nothing', async () => {
    const { sent } = fakeApi(sheets);
    show();
    await userEvent.click(await screen.findByRole('button', { name: 'Make the job' }));
    expect(await screen.findByText('Pick a process sheet.')).toBeVisible();
    expect(screen.getByRole('textbox', { name: 'Title' })).toHaveAccessibleDescription(/Give the job a title/);
    expect(made(sent)).toEqual([]);
    await expectAccessible();
  });

  it('puts what the server found at the field that is meant, and keeps the form', async () => {
    fakeApi({
      ...sheets,
      [create]: apiError(400, 'bad-request', { fields: [{ path: 'body.vehicle', message: 'is known already' }] }),
    });
    show();
    await userEvent.click(await screen.findByRole('radio', { name: /Bumper cover, new/ }));
    await userEvent.type(screen.getByRole('textbox', { name: 'Title' }), 'Front cover');
    await userEvent.click(screen.getByRole('button', { name: 'Make the job' }));
    const vehicle = screen.getByRole('textbox', { name: /Vehicle/ });
    await waitFor(() => expect(vehicle).toHaveAccessibleDescription(/Is known already\./));
    expect(screen.getByRole('textbox', { name: 'Title' })).toHaveValue('Front cover');
  });

  it('is still there after a reload, with the same id: sent twice it is one job', async () => {
    const { sent } = fakeApi({ ...sheets, [create]: 'unreachable' });
    const first = show();
    await userEvent.click(await screen.findByRole('radio', { name: /Bumper cover, new/ }));
    await userEvent.type(screen.getByRole('textbox', { name: 'Title' }), 'Front cover');
    await userEvent.click(screen.getByRole('button', { name: 'Make the job' }));
    await screen.findByText(/The form is kept/);
    await waitFor(() => expect(JSON.stringify({ ...sessionStorage })).toContain('Front cover'));
    first.unmount();
    show();
    expect(await screen.findByText('This is the form as you left it.')).toBeVisible();
    expect(screen.getByRole('textbox', { name: 'Title' })).toHaveValue('Front cover');
    await userEvent.click(screen.getByRole('button', { name: 'Make the job' }));
    await waitFor(() => expect(made(sent)).toHaveLength(2));
    expect(made(sent)[0]).toEqual(made(sent)[1]);
  });

  it('says the heat limit with its caution, in the person’s unit', async () => {
    const { sent } = fakeApi({ ...sheets, [create]: { body: sampleJob() } });
    const me = meAs('office');
    renderPage(<NewJobPage />, {
      at: '/jobs/new',
      me: { ...me, account: { ...me.account, temperatureUnit: 'F' } },
      others,
    });
    await userEvent.click(await screen.findByRole('radio', { name: /Bumper cover, new/ }));
    await userEvent.type(screen.getByRole('textbox', { name: 'Title' }), 'Front cover');
    await userEvent.click(screen.getByRole('checkbox', { name: /High-voltage battery/ }));
    expect(screen.getByRole('note', { name: 'Caution' })).toBeVisible();
    expect(screen.getByText(/Left empty: 120 °F/)).toBeVisible();
    await userEvent.type(screen.getByRole('textbox', { name: /Heat limit of the vehicle, °F/ }), '140');
    await userEvent.click(screen.getByRole('button', { name: 'Make the job' }));
    await waitFor(() => expect(made(sent)[0]?.heatLimitCelsius).toBeCloseTo(60, 9));
  });

  it('is not for painters', async () => {
    fakeApi(sheets);
    renderPage(<NewJobPage />, { at: '/jobs/new', me: meAs('painter') });
    expect(await screen.findByText('Jobs are made by office, lead or owner')).toBeVisible();
  });
});
