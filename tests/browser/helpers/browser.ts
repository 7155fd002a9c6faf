import { chromium, type Browser, type BrowserContext, type ConsoleMessage, type Page } from 'playwright-core';
import { ensureChromium } from '../../../scripts/lib/chromium.mjs';
import signIns from '../../../seeds/demo-sign-ins.json' with { type: 'json' };
import type { Program } from './program.ts';

/** Long, since a busy machine is not a fault. */
const patience = 60_000;

export const launch = (): Promise<Browser> =>
  chromium.launch({
    executablePath: ensureChromium(),
    chromiumSandbox: false,
    timeout: patience,
    args: ['--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-sync'],
  });

export type Look = { width: number; height: number; theme?: 'light' | 'dark'; touch?: boolean };
export const desk: Look = { width: 1440, height: 900 };
export const phone: Look = { width: 390, height: 844, touch: true };

export type Person = (typeof signIns)[number];
export function person(name: string): Person {
  const found = signIns.find((one) => one.name === name);
  if (!found) throw new Error(`The demo has no account of ${name}.`);
  return found;
}

/**
 * A browser of somebody's own, with the program's clock. `faults` fills with what the page's console complains of,
 * refusals of the content security policy among it, and with errors that nobody caught.
 */
export async function openContext(
  browser: Browser,
  program: Program,
  look: Look = desk,
): Promise<{ context: BrowserContext; page: Page; faults: string[] }> {
  const { width, height, theme = 'light', touch = false } = look;
  const context = await browser.newContext({
    baseURL: program.url,
    viewport: { width, height },
    colorScheme: theme,
    hasTouch: touch,
    isMobile: touch,
    reducedMotion: 'reduce',
    // Another zone than the shop's: what is shown must be the shop's time all the same.
    timezoneId: 'Pacific/Auckland',
    locale: 'en-GB',
  });
  context.setDefaultTimeout(patience);
  await context.clock.install({ time: program.now() });
  const faults: string[] = [];
  context.on('console', (message) => {
    if (message.type() === 'error' && !isNoFault(message))
      faults.push(`${message.page()?.url() ?? ''}: ${message.text()}`);
  });
  context.on('weberror', (thrown) => faults.push(String(thrown.error())));
  return { context, page: await context.newPage(), faults };
}

/**
 * "Who am I?" is answered with 401 to a stranger, as it should be; the browser notes each 401. And a letter is shown in a
 * frame where no script may run, not even the one that sets the clock of these tests.
 */
const isNoFault = (message: ConsoleMessage): boolean =>
  (message.location().url.endsWith('/api/session') && message.text().includes('401')) ||
  message.text().startsWith("Blocked script execution in 'about:srcdoc'");

export async function signIn(page: Page, who: Person, to = '/'): Promise<void> {
  await page.goto(to);
  await page.getByLabel('E-mail').fill(who.email);
  await page.getByLabel('Password', { exact: true }).fill(who.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('button', { name: `Account menu of ${who.name}` }).waitFor();
}
