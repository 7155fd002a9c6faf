import { fireEvent, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, expect, it, vi } from 'vitest';
import { inShop } from '#contracts/common.ts';
import { csvExport, csvImport, csvReport } from '#contracts/csv.ts';
import { endpoint } from '#contracts/endpoint.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { fakeApi } from '#src/testing/fake-api.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { CsvPanel } from './csv-panel.tsx';

afterEach(() => vi.unstubAllGlobals());
const path = '/api/shops/:shopId/lamps/csv' as const;
const exportFrom = endpoint({ name: 'export-lamps', method: 'GET', path, params: inShop, reply: csvExport });
const importTo = endpoint({
  name: 'import-lamps',
  method: 'POST',
  path,
  params: inShop,
  body: csvImport,
  reply: csvReport,
});
const at = `/api/shops/${shopId}/lamps/csv`;
const panel = <CsvPanel what="lamps" exportFrom={exportFrom} importTo={importTo} columns="name and kW." />;
const file = (text: string | Uint8Array<ArrayBuffer>) => new File([text], 'lamps.csv', { type: 'text/csv' });

it('saves the list with a byte order mark', async () => {
  fakeApi({ [`GET ${at}`]: { body: { fileName: 'lamps-2026-03-12.csv', csv: 'name\r\nLamp A\r\n' } } });
  const saved: { name: string; blob: Blob }[] = [];
  const blobs: Blob[] = [];
  vi.stubGlobal(
    'URL',
    Object.assign(URL, { createObjectURL: (blob: Blob) => `blob:${blobs.push(blob)}`, revokeObjectURL() {} }),
  );
  vi.spyOn(HTMLAnchorElement.prototype, 'click').mockImplementation(function (this: HTMLAnchorElement) {
    saved.push({ name: this.download, blob: blobs[0] as Blob });
  });
  renderPage(panel, { me: meAs('owner') });
  await userEvent.click(screen.getByRole('button', { name: 'Export lamps as CSV' }));
  await waitFor(() => expect(saved).toHaveLength(1));
  expect(saved[0]?.name).toBe('lamps-2026-03-12.csv');
  expect([...new Uint8Array((await saved[0]?.blob.arrayBuffer()) ?? [])].slice(0, 5)).toEqual([
    0xef, 0xbb, 0xbf, 0x6e, 0x61,
  ]);
});

it('shows what is wrong line by line and offers nothing to take', async () => {
  const faults = [{ line: 3, column: 'kW', message: 'This must be a number.' }];
  const { sent } = fakeApi({ [`POST ${at}`]: { body: { lines: 2, added: 0, changed: 0, faults } } });
  renderPage(panel, { me: meAs('owner') });
  await userEvent.click(screen.getByRole('button', { name: 'Import lamps from CSV' }));
  await userEvent.upload(screen.getByLabelText('CSV file of lamps'), file('name;kW\nLamp A;6\nLamp B;six'));
  expect(await screen.findByRole('row', { name: '3 kW This must be a number.' })).toBeVisible();
  expect(sent.map(({ body }) => body)).toEqual([{ csv: 'name;kW\nLamp A;6\nLamp B;six', tryOnly: true }]);
  expect(screen.queryByRole('button', { name: /^Take/ })).not.toBeInTheDocument();
  await expectAccessible();
});

it('takes all lines once the try was clean, with one key however often it is sent', async () => {
  let tries = 0;
  const report = { lines: 2, added: 1, changed: 0, faults: [] };
  const { sent } = fakeApi({
    [`POST ${at}`]: ({ body }) =>
      (body as { tryOnly: boolean }).tryOnly || ++tries > 1 ? { body: report } : ('unreachable' as const),
  });
  renderPage(panel, { me: meAs('owner') });
  await userEvent.click(screen.getByRole('button', { name: 'Import lamps from CSV' }));
  // Old spreadsheets save the western single-byte set: 0xFC is u with dots.
  const bytes = new Uint8Array([...'name\nL'].map((sign) => sign.charCodeAt(0)).concat(0xfc));
  fireEvent.drop(screen.getByText('or drop it here'), { dataTransfer: { files: [file(bytes)] } });
  expect(await screen.findByText(/2 lines, 1 new, 0 changed, 1 as they are/)).toBeVisible();
  const take = screen.getByRole('button', { name: 'Take all 2 lines' });
  take.focus();
  await userEvent.keyboard('{Enter}');
  expect(await screen.findByRole('alert')).toHaveTextContent('Nothing was taken.');
  await userEvent.keyboard('{Enter}');
  await waitFor(() => expect(screen.queryByRole('dialog')).not.toBeInTheDocument());
  const taken = sent.filter(({ body }) => !(body as { tryOnly: boolean }).tryOnly);
  expect(taken.map(({ body }) => body)).toEqual(Array(2).fill({ csv: 'name\nLü', tryOnly: false }));
  expect(new Set(taken.map(({ headers }) => headers.get('idempotency-key'))).size).toBe(1);
});

it('is only an export for who may not write', async () => {
  renderPage(<CsvPanel what="lamps" exportFrom={exportFrom} columns="name." />, { me: meAs('lead') });
  expect(await screen.findByRole('button', { name: 'Export lamps as CSV' })).toBeInTheDocument();
  expect(screen.queryByRole('button', { name: /Import/ })).toBeNull();
});
