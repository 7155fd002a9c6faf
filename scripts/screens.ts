// `node --import tsx scripts/screens.ts`: takes the README's pictures of the demo shop, always at the same time of the
// same day, into docs/screens.
import { mkdirSync } from 'node:fs';
import path from 'node:path';
import type { Page } from 'playwright-core';
import { migrateLatest } from '#server/db/migrate.ts';
import { demoShopId } from '../seeds/index.ts';
import { desk, launch, openContext, person, phone, signIn, type Look } from '../tests/browser/helpers/browser.ts';
import {
  barOf,
  days,
  drag,
  findIllegalMove,
  findLegalMove,
  mayBeDragged,
  readDay,
  spanOf,
} from '../tests/browser/helpers/day.ts';
import { startProgram } from '../tests/browser/helpers/program.ts';
import { settled } from '../tests/browser/helpers/settled.ts';
import { throwawayCluster } from '../tests/helpers/postgres.ts';

const folder = process.argv[2] ?? 'docs/screens';
mkdirSync(folder, { recursive: true });
const cluster = await throwawayCluster();
const url = cluster.url('template_ovenbird');
await migrateLatest(url);
const program = await startProgram({ url, ownerUrl: url, drop: async () => undefined });
const browser = await launch();

async function take(page: Page, name: string): Promise<void> {
  await settled(page);
  await page.screenshot({ path: path.join(folder, `${name}.png`) });
  process.stdout.write(`${name}\n`);
}

async function as(name: string, look: Look, show: (page: Page) => Promise<void>): Promise<void> {
  const { context, page } = await openContext(browser, program, look);
  await signIn(page, person(name), '/account');
  await show(page);
  await context.close();
}

async function takeDoor(): Promise<void> {
  const { context, page } = await openContext(browser, program);
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').waitFor();
  await take(page, 'sign-in');
  await context.close();
}

async function takePosted(page: Page): Promise<void> {
  await page.goto('/day');
  await page.locator('[data-bar]').first().waitFor();
  await take(page, 'day-light');
  await page.emulateMedia({ colorScheme: 'dark' });
  await take(page, 'day-dark');
  await page.emulateMedia({ colorScheme: 'light' });
  await page.goto('/day?view=week');
  await page.locator('[data-bar]').first().waitFor();
  await take(page, 'week-light');
  await page.goto('/jobs');
  await page.getByRole('row').nth(5).waitFor();
  await take(page, 'jobs-light');
  await page.getByRole('link', { name: 'Right side after a post' }).first().click();
  await page.getByRole('heading', { name: 'Right side after a post' }).waitFor();
  await take(page, 'job-light');
  await page.goto('/use');
  await page.getByRole('table').first().waitFor();
  await take(page, 'use-light');
}

async function takeRefusal(page: Page): Promise<void> {
  await page.request.post(`/api/shops/${demoShopId}/draft`, { data: {} });
  const view = await readDay(page.request, 'draft');
  const { bar, to } = await findIllegalMove(page.request, view, mayBeDragged(view), 1);
  await page.goto('/day');
  await barOf(page, bar.id).waitFor();
  await drag(page, bar, to);
  await page.getByRole('alert').waitFor();
  await page.mouse.move(0, 0);
  await page.evaluate(() => scrollTo(0, 0));
  await take(page, 'refusal');
}

async function takeComparison(page: Page): Promise<void> {
  const view = await readDay(page.request, 'draft', spanOf(days[1]));
  const found = await findLegalMove(page.request, view, mayBeDragged(view));
  if (found) {
    await page.goto(`/day?date=${days[1]}`);
    await barOf(page, found.bar.id).waitFor();
    await drag(page, found.bar, found.to);
    await page.getByText(/^Draft, [1-9]/).waitFor();
  }
  await page.getByRole('button', { name: 'Plan the rest' }).click();
  await page.getByRole('region', { name: 'Planning' }).waitFor();
  await page.getByRole('region', { name: 'Planning' }).waitFor({ state: 'detached' });
  await page.getByRole('button', { name: 'Compare and post' }).click();
  await page.getByRole('heading', { name: 'What changes' }).waitFor();
  await take(page, 'compare');
}

try {
  await takeDoor();
  await as('Orlin', desk, takePosted);
  await as('Tavi', phone, async (page) => {
    await page.goto('/bench');
    await page.getByRole('heading', { level: 2 }).first().waitFor();
    await take(page, 'bench-phone');
  });
  await as('Orlin', phone, async (page) => {
    await page.goto('/day');
    await page.getByRole('heading', { name: 'Booth 1' }).waitFor();
    await take(page, 'day-phone');
  });
  await as('Orlin', desk, async (page) => {
    await takeRefusal(page);
    await takeComparison(page);
  });
} finally {
  await browser.close();
  await program.close();
  await cluster.stop();
}
