import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { CoatingDetail } from '#contracts/coatings.ts';
import type { Job } from '#contracts/jobs.ts';
import type { TouchedByCoating } from '#contracts/retiming.ts';
import { demoShopId } from '../../seeds/index.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { desk, launch, openContext, person, phone, signIn, type Look } from './helpers/browser.ts';
import { startProgram, type Program } from './helpers/program.ts';

// A maker's sheet has changed: entered, its PDF attached, and only what was ticked is re-timed.
const shop = `/api/shops/${demoShopId}`;
const name = 'Medium-solid clear';

let database: TestDatabase;
let program: Program;
let browser: Browser;
let lead: Page;
const faults: string[] = [];
const contexts: BrowserContext[] = [];

async function enter(who: string, look: Look, to: string): Promise<Page> {
  const opened = await openContext(browser, program, look);
  contexts.push(opened.context);
  opened.context.on('close', () => faults.push(...opened.faults));
  await signIn(opened.page, person(who), to);
  return opened.page;
}
beforeAll(async () => {
  database = await freshDatabase();
  [program, browser] = await Promise.all([startProgram(database), launch()]);
});
afterAll(async () => {
  await browser?.close();
  await program?.close();
  await database?.drop();
});

const asked = async <T>(path: string): Promise<T> => (await (await lead.request.get(path)).json()) as T;
const flashesOf = async (jobId: string): Promise<number[]> => {
  const job = await asked<Job>(`${shop}/jobs/${jobId}`);
  return job.stages
    .filter(({ state }) => state === 'waiting')
    .flatMap(({ ways }) => ways.flatMap(({ phases }) => phases))
    .filter(({ source, kind }) => source === 'flash-between' && kind === 'flash')
    .map(({ minutes }) => minutes);
};

describe('a data sheet changed and a job re-timed', { timeout: 240_000 }, () => {
  let coating: CoatingDetail;
  let jobs: TouchedByCoating['jobs'];

  test('the lead finds it, types the new flash in, and is warned of a pot life that is too short', async () => {
    lead = await enter('Orlin', desk, '/shop/coatings');
    await lead.getByRole('link', { name }).click();
    const flash = lead.getByRole('textbox', { name: 'Flash between coats, min' });
    await flash.fill('14');
    const pot = lead.getByRole('textbox', { name: /^Pot life/ });
    await pot.fill('10');
    await lead.getByText(/Pot life shorter than its coats/).waitFor();
    await pot.fill('2 h');
    await lead.getByRole('button', { name: 'Save data sheet' }).click();
    await lead.getByText('All is saved.').waitFor();
    const { coatings } = await asked<{ coatings: CoatingDetail[] }>(`${shop}/coating-survey`);
    const found = coatings.find((one) => one.name === name);
    if (!found) throw new Error('the demo has no such coating');
    coating = found;
    expect(coating).toMatchObject({ version: 2, sheet: { flashBetweenCoats: 14, potLife: 120 } });
  });

  test('nothing is re-timed until told to, and then only what is ticked', async () => {
    const before = await asked<TouchedByCoating>(`${shop}/coatings/${coating.id}/touched`);
    jobs = before.jobs.filter(({ differs }) => differs);
    const [left, taken] = jobs;
    if (!left || !taken) throw new Error('the demo has too few jobs that wait for clear');
    expect(await flashesOf(taken.id)).toContain(10);
    const panel = lead.getByRole('region', { name: 'What it touches' });
    await panel.getByRole('checkbox', { name: `${left.number} ${left.title}` }).uncheck();
    await panel.getByRole('button', { name: /^Re-time these/ }).click();
    await panel.getByText(/^Re-timed:/).waitFor();
    expect(await flashesOf(taken.id)).toContain(14);
    expect(await flashesOf(left.id)).not.toContain(14);
    const after = await asked<TouchedByCoating>(`${shop}/coatings/${coating.id}/touched`);
    expect(after.jobs.filter(({ differs }) => differs).map(({ id }) => id)).toEqual([left.id]);
    expect(after.sheets.some(({ differs }) => differs)).toBe(false);
    expect(after.sheets.map(({ version }) => version)).toContain(2);
  });

  test('the maker’s PDF is attached and opens', async () => {
    const pdf = Buffer.from('%PDF-1.7\n1 0 obj\n<< /Title (clear) >>\nendobj\n%%EOF\n');
    const choosing = lead.waitForEvent('filechooser');
    await lead.getByRole('button', { name: 'Choose a file' }).click();
    await (await choosing).setFiles({ name: 'clear sheet.pdf', mimeType: 'application/pdf', buffer: pdf });
    const link = lead.getByRole('link', { name: /clear sheet\.pdf/ });
    await link.waitFor();
    const answer = await lead.request.get((await link.getAttribute('href')) ?? '');
    expect(answer.headers()['content-disposition']).toBe('inline; filename="clear sheet.pdf"');
    expect((await answer.body()).equals(pdf)).toBe(true);
  });

  test('a painter reads it on the phone and changes nothing', async () => {
    const painter = await enter('Tavi', phone, `/shop/coatings/${coating.id}`);
    const flash = painter.getByRole('textbox', { name: 'Flash between coats, min' });
    await flash.waitFor();
    expect([await flash.inputValue(), await flash.isDisabled()]).toEqual(['14', true]);
    expect(await painter.getByRole('button', { name: /Save|Re-time|Retire/ }).count()).toBe(0);
    expect(await painter.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
  });

  test('and no page complained', async () => {
    for (const context of contexts.splice(0)) await context.close();
    expect(faults).toEqual([]);
  });
});
