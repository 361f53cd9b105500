import type { Browser, BrowserContext, Page } from 'playwright-core';
import type { WholeSystem } from './whole-system.ts';

export interface Visit {
  readonly context: BrowserContext;
  readonly page: Page;
}

/** Opens a browser of its own for one visitor; what its console complains of goes into the list. */
export async function visit(
  browser: Browser,
  complaints: string[],
  [width, height]: readonly [number, number] = [1360, 900],
): Promise<Visit> {
  const context = await browser.newContext({ viewport: { width, height }, locale: 'en-GB' });
  const page = await context.newPage();
  page.on('pageerror', (error) => complaints.push(String(error)));
  page.on('console', (message) => {
    if (message.type() === 'error') complaints.push(`${page.url()}: ${message.text()}`);
  });
  return { context, page };
}

/** Signs in at the stand-in provider, from the front page. */
export async function signInAs(page: Page, system: WholeSystem, name: string): Promise<void> {
  await page.goto(system.baseUrl);
  await page.getByRole('link', { name: 'Sign in' }).click();
  await page.waitForURL((url) => url.origin === system.issuer);
  await page.getByRole('button', { name: new RegExp(name) }).click();
}
