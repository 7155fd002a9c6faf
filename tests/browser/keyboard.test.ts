import type { Browser, BrowserContext, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import type { Bar, DayView } from '#contracts/day.ts';
import { formatTime } from '#src/lib/formats.ts';
import { demoShopId } from '../../seeds/index.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { launch, openContext, person, signIn } from './helpers/browser.ts';
import { barOf, findLegalMove, mayBeDragged, readDay, type Target } from './helpers/day.ts';
import { startProgram, type Program } from './helpers/program.ts';

let database: TestDatabase;
let program: Program;
let browser: Browser;
let context: BrowserContext;
let page: Page;
let faults: string[];

beforeAll(async () => {
  database = await freshDatabase();
  [program, browser] = await Promise.all([startProgram(database), launch()]);
  ({ context, page, faults } = await openContext(browser, program));
});
afterAll(async () => {
  await browser?.close();
  await program?.close();
  await database?.drop();
});

const time = (at: string) => formatTime(at, { zone: 'Europe/Amsterdam', clock: '24' });

/** Presses a key until what is wanted has the focus, as who has no mouse would. */
async function pressUntil(key: string, wanted: Locator, most = 80): Promise<void> {
  for (let i = 0; i < most; i++) {
    if (await wanted.evaluateAll((found) => found.some((element) => element === document.activeElement))) return;
    await page.keyboard.press(key);
  }
  throw new Error(`${key} does not lead to ${String(wanted)}.`);
}

/** Another time for a stage, in the place where it stands. */
async function otherTime(view: DayView): Promise<{ bar: Bar; to: Target }> {
  for (const bar of mayBeDragged(view)) {
    const found = await findLegalMove(page.request, view, [bar]);
    if (found && found.to.start !== bar.from) return found;
  }
  throw new Error('No stage may be moved to another time: the demo shop has changed, and so must this test.');
}

test('a bar is found, opened and moved without a mouse, and the move is taken back', { timeout: 240_000 }, async () => {
  await signIn(page, person('Orlin'), '/day');
  await page.request.post(`/api/shops/${demoShopId}/draft`, { data: {} });
  const view = await readDay(page.request, 'draft');
  const { bar, to } = await otherTime(view);
  const place = (id: string) => view.rows.find((row) => row.id === id)?.name ?? '';
  const at = (where: Target) =>
    barOf(page, bar.id).and(page.locator(`[aria-label*="${place(where.placeId)}, ${time(where.start)} to"]`));
  const home = { start: bar.from, placeId: bar.placeId };

  await page.goto('/day');
  await at(home).waitFor();
  await page.getByText(/^Draft, 0 changes/).waitFor();
  // One stop for Tab in the whole timeline; from there by arrows, row by row and along the row.
  await pressUntil('Tab', page.locator('[data-bar]'));
  const rows = view.rows.map(({ id }) => id);
  const firstOfRow = (rowId: string) => page.locator(`[data-bar][aria-label*="${place(rowId)},"]`);
  if (rows.indexOf(bar.placeId) > 0) await pressUntil('ArrowDown', firstOfRow(bar.placeId), 20);
  await page.keyboard.press('Home');
  await pressUntil('ArrowRight', barOf(page, bar.id), 40);

  await page.keyboard.press('Enter');
  const panel = page.getByRole('complementary', { name: `${bar.jobNumber} ${bar.title}` });
  await panel.getByRole('heading', { level: 2 }).waitFor();
  await expect.poll(() => barOf(page, bar.id).getAttribute('aria-pressed')).toBe('true');
  if (to.placeId !== bar.placeId) {
    await pressUntil('Tab', panel.getByLabel('Place'));
    await page.keyboard.type(place(to.placeId));
  }
  await pressUntil('Tab', panel.getByLabel('Start'));
  await page.keyboard.press('Control+A');
  await page.keyboard.type(time(to.start));
  await page.keyboard.press('Enter');
  await at(to).waitFor();
  await page.getByText(/^Draft, [1-9]\d* changes? from posted plan 1/).waitFor();
  // Whoever cannot see the bar hears where it stands now, and goes on from the form.
  await page
    .getByText(new RegExp(`${time(to.start)} in ${place(to.placeId)}`))
    .first()
    .waitFor();
  expect(await panel.evaluate((element) => element.contains(document.activeElement))).toBe(true);

  // Within a field Ctrl+Z is the field's own; on the board it takes back the move.
  await page.keyboard.press('Escape');
  await panel.waitFor({ state: 'detached' });
  expect(await at(to).evaluate((element) => element === document.activeElement)).toBe(true);
  await page.keyboard.press('Control+z');
  await at(home).waitFor();
  await page.getByText(/^Draft, 0 changes/).waitFor();
  expect((await readDay(page.request, 'draft')).bars.find(({ id }) => id === bar.id)?.from).toBe(bar.from);
  await page.keyboard.press('Control+Shift+z');
  await at(to).waitFor();
  expect(faults).toEqual([]);
  await context.close();
});
