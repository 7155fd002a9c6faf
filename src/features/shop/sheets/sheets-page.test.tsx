import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { expect, it } from 'vitest';
import { importSheet, type SheetFile } from '#contracts/sheets.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as SheetsPage } from './sheets-page.tsx';
import { sampleBody, sampleSheet, sampleSurvey } from './testing/sample-sheets.ts';

const survey = `GET /api/shops/${shopId}/process-sheet-survey`;
const others = [{ path: '/shop/sheets/:sheetId', element: <p>The sheet&rsquo;s page</p> }];
const show = (role: 'lead' | 'painter' = 'lead') =>
  renderPage(<SheetsPage />, { at: '/shop/sheets', me: meAs(role), others });
const retired = sampleSurvey({
  id: '01958000-0000-7000-8000-000000000102',
  name: 'Old way',
  retiredAt: '2026-03-01T08:00:00.000Z',
  openJobs: 1,
});

it('shows what is in use with stages, version and open jobs, and what is retired apart', async () => {
  fakeApi({ [survey]: { body: { sheets: [sampleSurvey(), retired] } } });
  show();
  const row = within(await screen.findByRole('list', { name: 'In use' })).getByRole('listitem');
  expect(row).toHaveTextContent(/3 stages, at least 2 h 14 min · 1 option/);
  expect(row).toHaveTextContent('3 open jobs');
  expect(row).toHaveTextContent(/Version 2, Tue 10 Mar/);
  expect(screen.getByText('Retired (1)')).toBeVisible();
  await expectAccessible();
});

it('an empty shop is told what will be here; a painter is offered nothing to make', async () => {
  fakeApi({ [survey]: { body: { sheets: [] } } });
  const { unmount } = show();
  expect(await screen.findByText('No process sheet yet')).toBeVisible();
  expect(screen.getAllByRole('link', { name: 'New sheet' })).not.toHaveLength(0);
  unmount();
  show('painter');
  expect(await screen.findByText('No process sheet yet')).toBeVisible();
  expect(screen.queryByRole('link', { name: 'New sheet' })).not.toBeInTheDocument();
});

it('takes a sheet in from a file, and says which coating is missing', async () => {
  const file: SheetFile = {
    format: 'ovenbird-process-sheet',
    formatVersion: 1,
    name: 'Bonnet, clear only',
    body: {
      ...sampleBody,
      stages: sampleBody.stages.map(({ coatingId, ...stage }) => ({ ...stage, coating: coatingId && 'Solid clear' })),
    },
  };
  let turn = 0;
  const { sent } = fakeApi({
    [survey]: { body: { sheets: [] } },
    [`POST /api/shops/${shopId}/process-sheet-imports`]: () =>
      turn++ === 0
        ? apiError(400, 'bad-request', {
            fields: [{ path: 'body.file.body.stages.1.coating', message: 'this shop has no coating “Solid clear”' }],
          })
        : { body: sampleSheet() },
  });
  show();
  await userEvent.click(await screen.findByRole('button', { name: 'From a file' }));
  const dialog = within(await screen.findByRole('dialog'));
  const input = dialog.getByLabelText(/A file of one process sheet/);
  await userEvent.upload(input, new File(['{ "half": '], 'broken.json', { type: 'application/json' }));
  expect(await dialog.findByRole('alert')).toHaveTextContent('broken.json is no JSON file');
  await userEvent.upload(input, new File([JSON.stringify(file)], 'bonnet.json', { type: 'application/json' }));
  const name = await dialog.findByRole('textbox', { name: 'Name of the new sheet' });
  await userEvent.type(name, ', theirs');
  await userEvent.click(dialog.getByRole('button', { name: 'Take it in' }));
  expect(await dialog.findByText(/this shop has no coating “Solid clear”/)).toBeVisible();
  await userEvent.click(dialog.getByRole('button', { name: 'Take it in' }));
  expect(await screen.findByText('The sheet’s page')).toBeVisible();
  const bodies = sent.filter(({ method }) => method === 'POST').map(({ body }) => importSheet.body.parse(body));
  await waitFor(() => expect(bodies).toHaveLength(2));
  expect(bodies[0]).toMatchObject({ name: 'Bonnet, clear only, theirs', id: bodies[1]?.id });
});
