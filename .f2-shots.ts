import { launchBrowser } from './tests/support/browser.ts';
const only = process.argv[2] ?? 'all';
const browser = await launchBrowser();
for (const [w, h] of [[1360, 1063], [390, 844]] as const) for (const scheme of ['light', 'dark'] as const) {
  if (only !== 'all' && only !== `${w}-${scheme}`) continue;
  const ctx = await browser.newContext({ viewport: { width: w, height: h }, locale: 'en-GB', colorScheme: scheme, deviceScaleFactor: w === 390 ? 2 : 1 });
  const page = await ctx.newPage();
  page.on('pageerror', (e) => console.log('ERR', String(e)));
  page.on('console', (m) => { if (m.type() === 'error') console.log('CONS', m.text()); });
  await page.goto('http://localhost:3700');
  await page.getByRole('link', { name: 'Sign in' }).click();
  await page.getByRole('button', { name: /Ines Thackeray/ }).click();
  await page.getByRole('link', { name: 'Season plan' }).first().click();
  await page.getByRole('heading', { name: 'Season plans' }).waitFor();
  await page.waitForTimeout(500);
  await page.screenshot({ path: `/tmp/f2/list-${w}-${scheme}.png` });
  const list = page.locator('main');
  await page.goto('http://localhost:3700/season-plans/new');
  const t = Date.now();
  await page.getByRole('heading', { level: 2, name: /session/ }).waitFor();
  console.log('preview after', Date.now() - t);
  await page.waitForTimeout(500);
  await page.screenshot({ path: `/tmp/f2/new-${w}-${scheme}.png`, fullPage: w === 1360 });
  console.log(w, 'scrollW', await page.evaluate(() => document.documentElement.scrollWidth));
  await ctx.close();
}
await browser.close();
