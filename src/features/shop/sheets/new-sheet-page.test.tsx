import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, expect, it } from 'vitest';
import { createSheet } from '#contracts/sheets.ts';
import { fakeApi } from '#src/testing/fake-api.ts';
import { stubWidth } from '#src/testing/media.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as NewSheetPage } from './new-sheet-page.tsx';
import { sampleCoatings, sampleGround, sampleSheet, sheetId } from './testing/sample-sheets.ts';

const shop = `/api/shops/${shopId}`;
const usual = {
  [`GET ${shop}/coatings`]: { body: { coatings: sampleCoatings } },
  [`GET ${shop}/process-sheet-ground`]: { body: sampleGround },
};
const others = [{ path: '/shop/sheets/:sheetId', element: <p>The sheet&rsquo;s page</p> }];
const show = (search = '') =>
  renderPage(<NewSheetPage />, { at: `/shop/sheets/new${search}`, me: meAs('lead'), others });

// Against hanging, not against slowness: some two hundred key presses on a page that is judged anew after each.
const patience = 300_000;

beforeEach(() => stubWidth(1440));

/** Walks with Tab until what has the focus is called so. */
async function tabTo(name: RegExp): Promise<void> {
  for (let i = 0; i < 200; i++) {
    const at = document.activeElement;
    const called =
      at?.getAttribute('aria-label') ??
      (at instanceof HTMLInputElement ? at.labels?.[0]?.textContent : at?.textContent);
    if (at !== document.body && called !== null && called !== undefined && name.test(called)) return;
    await userEvent.tab();
  }
  throw new Error(`Tab never came to ${String(name)}`);
}

async function addStage(letters: string): Promise<void> {
  await tabTo(/^Add a stage$/);
  await userEvent.keyboard('{Enter}');
  await screen.findByRole('menu');
  await userEvent.keyboard(`${letters}{Enter}`);
}

it(
  'bumper cover, primer, lamp cure, base, clear, booth bake: from nothing, with the keyboard only',
  { timeout: patience },
  async () => {
    const { sent } = fakeApi({ ...usual, [`POST ${shop}/process-sheets`]: { body: sampleSheet({ version: 1 }) } });
    show();
    await screen.findByRole('region', { name: 'The chain' });
    await tabTo(/Name of the sheet/);
    await userEvent.keyboard('Bumper cover');
    await tabTo(/^Add a part$/);
    await userEvent.keyboard('{Enter}');
    await userEvent.tab({ shift: true });
    await tabTo(/^Part 1$/);
    await userEvent.keyboard('Cover');
    for (const letters of ['primer', 'lamp', 'base', 'clear', 'booth']) await addStage(letters);
    const list = within(screen.getByRole('region', { name: 'Stages' }));
    expect(list.getAllByRole('button', { name: /^\d/ })).toHaveLength(5);
    // Base colour one up and back again by its keys, said out loud.
    await tabTo(/^3Base colour/);
    await userEvent.keyboard('{Alt>}{ArrowUp}{/Alt}');
    expect(list.getByText('Base colour is now stage 2 of 5.')).toBeInTheDocument();
    await userEvent.keyboard('{Control>}z{/Control}');
    await tabTo(/^Save as version 1$/);
    await userEvent.keyboard('{Enter}');
    const dialog = await screen.findByRole('dialog');
    await tabTo(/^Save as version 1$/);
    expect(dialog).toContainElement(document.activeElement as HTMLElement);
    await userEvent.keyboard('{Enter}');
    expect(await screen.findByText('The sheet’s page')).toBeVisible();
    const { name, body } = createSheet.body.parse(sent.find(({ method }) => method === 'POST')?.body);
    expect(name).toBe('Bumper cover');
    expect(body?.parts).toMatchObject([{ name: 'Cover' }]);
    expect(
      body?.stages.map(({ title, coatingId }) => [title, sampleCoatings.find(({ id }) => id === coatingId)?.kind]),
    ).toEqual([
      ['Primer surfacer', 'primer'],
      ['Lamp cure', 'primer'],
      ['Base colour', 'base'],
      ['Clear', 'clear'],
      ['Booth bake', 'clear'],
    ]);
  },
);

it('begins like another sheet', async () => {
  const { sent } = fakeApi({
    ...usual,
    [`GET ${shop}/process-sheets/${sheetId}`]: { body: sampleSheet() },
    [`POST ${shop}/process-sheets`]: { body: sampleSheet({ version: 1 }) },
  });
  show(`?copy=${sheetId}`);
  expect(await screen.findByRole('textbox', { name: 'Name of the sheet' })).toHaveValue('Bonnet, clear only, copy');
  await userEvent.click(screen.getByRole('button', { name: 'Save as version 1' }));
  await userEvent.click(within(await screen.findByRole('dialog')).getByRole('button', { name: 'Save as version 1' }));
  expect(await screen.findByText('The sheet’s page')).toBeVisible();
  const made = createSheet.body.parse(sent.find(({ method }) => method === 'POST')?.body);
  expect(made.id).not.toBe(sheetId);
  expect(made.body).toEqual(sampleSheet().body);
});
