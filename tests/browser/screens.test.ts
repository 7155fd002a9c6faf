import AxeBuilder from '@axe-core/playwright';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { demoId } from '../../seeds/ids.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { desk, launch, openContext, person, phone, signIn } from './helpers/browser.ts';
import { startProgram, type Program } from './helpers/program.ts';
import { settled } from './helpers/settled.ts';

let database: TestDatabase;
let program: Program;
let browser: Browser;

beforeAll(async () => {
  database = await freshDatabase();
  [program, browser] = await Promise.all([startProgram(database), launch()]);
});
afterAll(async () => {
  await browser?.close();
  await program?.close();
  await database?.drop();
});

type Screen = { name: string; path: string; as: string | null; there: (page: Page) => Promise<void> };
const heading = (name: string | RegExp) => (page: Page) => page.getByRole('heading', { name }).first().waitFor();
/** A bar of the timeline, a card of the list. */
const booked = (page: Page) => page.locator('[data-bar], .day-list li').first().waitFor();
const job = demoId('job', 'Right side after a post/Blue minibus');

const screens: Screen[] = [
  { name: 'sign-in', path: '/sign-in', as: null, there: heading('Sign in') },
  { name: 'booth day', path: '/day', as: 'Orlin', there: booked },
  { name: 'booth day, a week', path: '/day?view=week', as: 'Orlin', there: booked },
  {
    name: 'jobs',
    path: '/jobs',
    as: 'Ennet',
    there: (page) => page.getByText('Right side after a post').first().waitFor(),
  },
  { name: 'new job', path: '/jobs/new', as: 'Ennet', there: (page) => page.getByText('Full side').first().waitFor() },
  { name: 'job', path: `/jobs/${job}`, as: 'Ennet', there: heading('18 Right side after a post') },
  {
    name: 'bench',
    path: '/bench',
    as: 'Tavi',
    there: (page) => page.locator('main').getByRole('heading', { level: 2 }).first().waitFor(),
  },
  { name: 'booth use', path: '/use', as: 'Halvine', there: heading('Hours by what the place did') },
  { name: 'account', path: '/account', as: 'Halvine', there: heading('Your account') },
  { name: 'members', path: '/shop/members', as: 'Halvine', there: (page) => page.getByText('Brisa').first().waitFor() },
  { name: 'licences', path: '/licences', as: null, there: heading(/Licences/) },
  { name: 'mailbox', path: '/mailbox', as: null, there: (page) => page.getByText('No letters yet').waitFor() },
];

/** What an aid for blind or short-sighted people would stumble over, with where. */
async function barriers(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).analyze();
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .flatMap(({ id, nodes }) =>
      nodes.map(({ target, failureSummary }) => `${id}: ${String(target)} ${failureSummary}`),
    );
}

const overflow = (page: Page): Promise<number> =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);

describe.each([
  ['on a desk', desk],
  ['on a phone', phone],
] as const)('%s', (_name, look) => {
  test.each(screens)('$name', { timeout: 240_000 }, async ({ path, as, there }) => {
    const { context, page, faults } = await openContext(browser, program, look);
    if (as === null) await page.goto(path);
    else await signIn(page, person(as), path);
    await there(page);
    for (const theme of ['light', 'dark'] as const) {
      await page.emulateMedia({ colorScheme: theme });
      await page.locator(`html[data-theme="${theme}"]`).waitFor();
      await settled(page);
      expect(await overflow(page), `${theme}: wider than the window`).toBeLessThanOrEqual(0);
      expect(await barriers(page), theme).toEqual([]);
    }
    expect(faults).toEqual([]);
    await context.close();
  });
});
