import type { Browser, BrowserContext, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { desk, launch, openContext, person, signIn } from './helpers/browser.ts';
import { startProgram, type Program } from './helpers/program.ts';

// The owner of the demo opens a second, empty shop and leads it to its first plan; then somebody is entered without a mouse.
let database: TestDatabase;
let program: Program;
let browser: Browser;
let context: BrowserContext;
let page: Page;
let faults: string[];

beforeAll(async () => {
  database = await freshDatabase();
  [program, browser] = await Promise.all([startProgram(database), launch()]);
  ({ context, page, faults } = await openContext(browser, program, desk));
});
afterAll(async () => {
  await browser?.close();
  await program?.close();
  await database?.drop();
});

const step = (title: string): Locator =>
  page.getByRole('listitem').filter({ has: page.getByRole('heading', { name: title }) });
const take = () => page.getByRole('button', { name: 'Take these' }).click();

/** Presses a key until what is wanted has the focus, as who has no mouse would. */
async function pressUntil(key: string, wanted: Locator, most = 60): Promise<void> {
  for (let i = 0; i < most; i++) {
    if (await wanted.evaluateAll((found) => found.some((element) => element === document.activeElement))) return;
    await page.keyboard.press(key);
  }
  throw new Error(`${key} does not lead to ${String(wanted)}.`);
}

describe('an empty shop', { timeout: 240_000 }, () => {
  test('is opened by somebody who has an account', async () => {
    await signIn(page, person('Halvine'), '/shop');
    await page.getByRole('link', { name: 'Open another shop' }).click();
    await page.getByLabel('Name of the shop').fill('Saltmarsh Coachworks');
    await page.getByLabel('Time zone').fill('Europe/Amsterdam');
    await page.getByRole('button', { name: 'Open the shop' }).click();
    await page.getByText('0 of 5 done').waitFor();
    await page.getByRole('link', { name: 'Set-up 0/5' }).waitFor();
  });

  test('comes to its first plan by taking what is filled in', async () => {
    await take();
    await page.getByText('1 of 5 done').waitFor();
    expect(await step('Booths, stations, lamps').textContent()).toContain('Purge before each bake: 3 min');
    await take();
    await page.getByText('2 of 5 done').waitFor();
    // Nobody sprays without a training on record: the step asks for it.
    await take();
    await page.getByText('Enter when each painter was last trained').waitFor();
    await page.getByLabel('Spray training 1').fill('2025-05-06');
    await take();
    await page.getByText('3 of 5 done').waitFor();

    // Left and come back to: what is done is still done.
    await page.reload();
    await page.getByText('3 of 5 done').waitFor();
    await take();
    await page.getByText('4 of 5 done').waitFor();
    await page.getByLabel('Title').fill('Left door, dent');
    await page.getByLabel('Process sheet').selectOption({ label: 'New steel panel' });
    await page.getByRole('button', { name: 'Take it in and plan' }).click();
    await page.waitForURL('**/day**');
    await page.locator('[data-bar]').first().waitFor();
    expect(await page.locator('[data-bar]').count()).toBeGreaterThan(2);
    await page.getByRole('link', { name: 'Set-up', exact: true }).waitFor();
  });

  test('has somebody entered on its roster without a mouse', async () => {
    await page.goto('/shop/people');
    await page.getByRole('row', { name: /Painter 1/ }).waitFor();
    await pressUntil('Tab', page.getByRole('button', { name: 'Add a person' }));
    await page.keyboard.press('Enter');
    const dialog = page.getByRole('dialog', { name: 'Somebody new' });
    await dialog.waitFor();
    await pressUntil('Tab', dialog.getByLabel('Name'));
    await page.keyboard.type('Brisa');
    await pressUntil('Tab', dialog.getByRole('combobox', { name: 'Skills' }));
    await page.keyboard.type('polish');
    await page.keyboard.press('Enter');
    await pressUntil('Tab', dialog.getByLabel('Monday, hours and breaks'));
    await page.keyboard.press('Control+A');
    await page.keyboard.type('9-17 (12:30-13)');
    await pressUntil('Tab', dialog.getByRole('button', { name: /Monday.s hours until Friday/ }));
    await page.keyboard.press('Space');
    await pressUntil('Tab', dialog.getByRole('button', { name: 'Add to the roster' }));
    await page.keyboard.press('Enter');
    const row = page.getByRole('row', { name: /Brisa/ });
    await row.waitFor();
    expect(await row.textContent()).toContain('Mon to Fri 9:00 to 17:00');
    await dialog.waitFor({ state: 'detached' });
    await context.close();
    expect(faults).toEqual([]);
  });
});
