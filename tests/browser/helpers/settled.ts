import type { Page } from 'playwright-core';

/** Resolves once fonts are there, nothing moves any more and nothing is loading. */
export async function settled(page: Page): Promise<void> {
  await page.locator('.breathe').first().waitFor({ state: 'detached' });
  await page.evaluate(async () => {
    await document.fonts.ready;
    await Promise.all(document.getAnimations().map(({ finished }) => finished.catch(() => undefined)));
  });
}
