import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it } from 'vitest';
import type { Role } from '#contracts/common.ts';
import { saveSheet } from '#contracts/sheets.ts';
import { expectAccessible } from '#src/testing/axe.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { stubWidth } from '#src/testing/media.ts';
import { meAs, renderPage, shopId } from '#src/testing/render-page.tsx';
import { Component as SheetPage } from './sheet-page.tsx';
import { sampleBody, sampleCoatings, sampleGround, sampleSheet, sheetId } from './testing/sample-sheets.ts';

const shop = `/api/shops/${shopId}`;
const one = `GET ${shop}/process-sheets/${sheetId}`;
const post = `POST ${shop}/process-sheets/${sheetId}/versions`;
const usual = {
  [one]: { body: sampleSheet() },
  [`GET ${shop}/coatings`]: { body: { coatings: sampleCoatings } },
  [`GET ${shop}/process-sheet-ground`]: { body: sampleGround },
};
const show = (role: Role = 'lead', search = '') =>
  renderPage(<SheetPage />, {
    at: `/shop/sheets/${sheetId}${search}`,
    pattern: '/shop/sheets/:sheetId',
    me: meAs(role),
    now: () => Date.parse('2026-03-12T08:31:00Z'),
  });
const saveButton = () => screen.getByRole('button', { name: 'Save as version 3' });
const stages = () => within(screen.getByRole('region', { name: 'Stages' }));
const openStage = async (name: RegExp) => userEvent.click(stages().getByRole('button', { name }));

beforeEach(() => stubWidth(1440));

// Against hanging, not against slowness: a page that is judged anew after each key.
describe('the editor of a process sheet', { timeout: 300_000 }, () => {
  it('draws the chain with its least time, and each option’s variant', async () => {
    fakeApi(usual);
    show();
    const chain = await screen.findByRole('region', { name: 'The chain' });
    // 30 + 34 + 10 wait + 60: polish is not there until it is chosen.
    expect(within(chain).getByRole('status')).toHaveTextContent('3 stages, at least 2 h 14 min');
    await userEvent.click(within(chain).getByRole('checkbox', { name: 'Polish' }));
    expect(within(chain).getByRole('status')).toHaveTextContent('4 stages, at least 2 h 44 min');
    expect(within(chain).getByText('10 min to 1 h')).toBeVisible();
    expect(saveButton()).toBeDisabled();
    await expectAccessible();
  });

  it('saves the next version with what changed, in words', async () => {
    const { sent } = fakeApi({ ...usual, [post]: { body: sampleSheet({ version: 3 }) } });
    show('lead', '?stage=clear');
    const minutes = await screen.findByRole('textbox', { name: 'Minutes of phase 1' });
    await userEvent.clear(minutes);
    await userEvent.type(minutes, '1:30');
    await userEvent.click(saveButton());
    const dialog = await screen.findByRole('dialog', { name: 'Save as version 3' });
    expect(dialog).toHaveTextContent('1 open job keeps the version it was made with.');
    expect(within(dialog).getByRole('cell', { name: /Clear, Sprayed/ })).toBeVisible();
    const note = within(dialog).getByRole('textbox', { name: /What changed/ });
    expect(note).toHaveValue('Clear, Sprayed: phases');
    await expectAccessible();
    await userEvent.click(within(dialog).getByRole('button', { name: 'Save as version 3' }));
    expect(await screen.findByText(/Version 3 is saved/)).toBeVisible();
    const body = saveSheet.body.parse(sent.find(({ method }) => method === 'POST')?.body);
    expect(body).toMatchObject({ version: 2, name: 'Bonnet, clear only', note: 'Clear, Sprayed: phases' });
    expect(body.body.stages[1]?.ways[0]?.phases[0]).toMatchObject({ kind: 'setup', minutes: 90 });
  });

  it('shows a fault at its field while one types, and the list leads to it', async () => {
    fakeApi(usual);
    show('lead', '?stage=bake');
    const way = within(await screen.findByRole('region', { name: 'Way: Booth bake' }));
    const latest = way.getByRole('textbox', { name: 'Latest' });
    await userEvent.clear(latest);
    await userEvent.type(latest, '5');
    const words = /The window closes after 5 min, and the stage cannot begin before 10 min/;
    expect(way.getByText(words)).toBeVisible();
    expect(saveButton()).toBeDisabled();
    expect(screen.getByText('1 to mend before it can be saved.')).toBeVisible();
    await userEvent.click(stages().getByRole('button', { name: /Parts and options/ }));
    expect(screen.queryByRole('region', { name: 'Way: Booth bake' })).not.toBeInTheDocument();
    await userEvent.click(screen.getByRole('button', { name: words }));
    await waitFor(() => {
      const gap = within(screen.getByRole('region', { name: 'Way: Booth bake' }));
      expect(gap.getByRole('textbox', { name: 'Earliest' })).toHaveFocus();
    });
  });

  it('keeps a figure that is none as it is typed, and saves nothing until it is one', async () => {
    fakeApi(usual);
    show('lead', '?stage=prep');
    const minutes = await screen.findByRole('textbox', { name: 'Minutes of phase 1' });
    await userEvent.clear(minutes);
    await userEvent.type(minutes, 'soon');
    await userEvent.tab();
    expect(minutes).toHaveValue('soon');
    expect(minutes).toHaveAccessibleDescription(/Minutes, or like 1:30/);
    await userEvent.type(screen.getByRole('textbox', { name: 'Stage' }), ' well');
    expect(saveButton()).toBeDisabled();
    await userEvent.clear(minutes);
    await userEvent.type(minutes, '45');
    expect(saveButton()).toBeEnabled();
  });

  it('brings back a stage that was taken out, and undoes and redoes from the keyboard', async () => {
    fakeApi(usual);
    show('lead', '?stage=bake');
    await userEvent.click(await screen.findByRole('button', { name: 'Take out Bake' }));
    expect(stages().queryByRole('button', { name: /^3\s*Bake/ })).not.toBeInTheDocument();
    await userEvent.click(await screen.findByRole('button', { name: 'Bring it back' }));
    expect(stages().getByRole('button', { name: /3\s*Bake/ })).toBeVisible();
    expect(saveButton()).toBeDisabled();
    await openStage(/Clear/);
    const title = screen.getByRole('textbox', { name: 'Stage' });
    await userEvent.type(title, 'coat');
    await userEvent.keyboard('{Control>}z{/Control}');
    expect(title).toHaveValue('Clear');
    await userEvent.keyboard('{Control>}y{/Control}');
    expect(title).toHaveValue('Clearcoat');
  });

  it('keeps what is not saved over a reload, and lets it go when asked', async () => {
    fakeApi(usual);
    const { unmount } = show();
    await userEvent.type(await screen.findByRole('textbox', { name: 'Name of the sheet' }), ' and more');
    window.dispatchEvent(new Event('pagehide'));
    unmount();
    show();
    expect(await screen.findByRole('textbox', { name: 'Name of the sheet' })).toHaveValue(
      'Bonnet, clear only and more',
    );
    expect(screen.getByText(/your changes as you left them/)).toBeVisible();
    await userEvent.click(screen.getByRole('button', { name: 'Let them go' }));
    expect(screen.getByRole('textbox', { name: 'Name of the sheet' })).toHaveValue('Bonnet, clear only');
    expect(saveButton()).toBeDisabled();
  });

  it('keeps the own changes when somebody was faster, and saves them only on top of what one has seen', async () => {
    const theirs = sampleSheet({
      version: 3,
      body: { ...sampleBody, summary: 'Their words.' },
    });
    const saved = sampleSheet({ version: 4 });
    let turn = 0;
    const { sent } = fakeApi({
      ...usual,
      [post]: () => (turn++ === 0 ? apiError(409, 'stale', { current: theirs }) : { body: saved }),
    });
    show();
    await userEvent.type(await screen.findByRole('textbox', { name: /What it is for/ }), ' Mine.');
    await userEvent.click(saveButton());
    await userEvent.click(within(await screen.findByRole('dialog')).getByRole('button', { name: 'Save as version 3' }));
    const alert = await screen.findByText(/Imke Tiedemann posted version 3/);
    expect(alert).toBeVisible();
    await userEvent.keyboard('{Escape}');
    expect(screen.getByRole('textbox', { name: /What it is for/ })).toHaveValue(
      'A bonnet that only needs clear. Mine.',
    );
    await userEvent.click(screen.getByRole('button', { name: 'Compare mine with theirs' }));
    const comparison = await screen.findByRole('dialog', { name: 'Mine beside theirs' });
    expect(within(comparison).getByRole('cell', { name: 'Their words.' })).toBeVisible();
    await userEvent.keyboard('{Escape}');
    await userEvent.click(screen.getByRole('button', { name: 'Go on with mine' }));
    await userEvent.click(screen.getByRole('button', { name: 'Save as version 4' }));
    await userEvent.click(within(await screen.findByRole('dialog')).getByRole('button', { name: 'Save as version 4' }));
    expect(await screen.findByText(/Version 4 is saved/)).toBeVisible();
    const versions = sent
      .filter(({ method }) => method === 'POST')
      .map(({ body }) => saveSheet.body.parse(body).version);
    expect(versions).toEqual([2, 3]);
  });

  it('takes the times of a data sheet that has changed', async () => {
    const coatings = sampleCoatings.map((one) =>
      one.kind === 'clear' ? { ...one, sheet: { ...one.sheet, flashBetweenCoats: 15 } } : one,
    );
    fakeApi({ ...usual, [`GET ${shop}/coatings`]: { body: { coatings } } });
    show('lead', '?stage=clear');
    const flash = await screen.findByRole('textbox', { name: 'Minutes of phase 3' });
    expect(flash).toHaveValue('10');
    await userEvent.click(screen.getByRole('button', { name: 'Take the times of the data sheet' }));
    expect(flash).toHaveValue('15');
  });

  it('is there to read for a painter', async () => {
    fakeApi(usual);
    show('painter', '?stage=clear');
    expect(await screen.findByRole('textbox', { name: 'Minutes of phase 1' })).toBeDisabled();
    expect(screen.queryByRole('button', { name: /Save as/ })).not.toBeInTheDocument();
    expect(screen.queryByRole('button', { name: 'Add a stage' })).not.toBeInTheDocument();
    await expectAccessible();
  });

  it('says so where there is no such sheet', async () => {
    fakeApi({ ...usual, [one]: apiError(404, 'not-found') });
    show();
    expect(await screen.findByText('This shop has no such process sheet')).toBeVisible();
  });
});
