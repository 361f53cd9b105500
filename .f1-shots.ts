import { AxeBuilder } from '@axe-core/playwright';
import { launchBrowser } from './tests/support/browser.ts';
const base = 'http://localhost:3790';
const browser = await launchBrowser();
const only = process.argv.slice(2);
for (const [scheme, width] of [['light', 1360], ['light', 390], ['dark', 1360], ['dark', 390]] as const) {
  if (only.length && !only.includes(`${scheme}${width}`)) continue;
  const context = await browser.newContext({ viewport: { width, height: width === 390 ? 844 : 900 }, colorScheme: scheme, locale: 'en-GB' });
  const page = await context.newPage();
  page.on('pageerror', (e) => console.log('pageerror', e));
  page.on('console', (m) => { if (m.type() === 'error') console.log('console', page.url(), m.text()); });
  await page.goto(base);
  await page.getByRole('link', { name: 'Sign in' }).click();
  await page.getByRole('button', { name: /Ines Thackeray/ }).click();
  await page.waitForURL((u) => u.port === '3790');
  const shot = async (name: string) => {
    await page.waitForLoadState('networkidle');
    await page.waitForTimeout(700);
    await page.screenshot({ path: `/tmp/f1-${name}-${scheme}-${width}.png`, fullPage: true });
    const over = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
    const axe = await new AxeBuilder({ page }).analyze();
    console.log(name, scheme, width, 'overflow', over, axe.violations.map((v) => `${v.id}: ${v.nodes.slice(0,2).map((n) => n.html.slice(0,160)).join(' | ')}`));
  };
  await page.goto(`${base}/shores`); await page.getByRole('heading', { level: 2 }).first().waitFor();
  await shot('shores');
  await page.getByRole('heading', { level: 2 }).first().getByRole('link').click();
  await page.getByText('in the year ahead').first().waitFor();
  if (width === 390) await page.locator('details > summary').filter({ hasText: 'The water on' }).click();
  await shot('shore');
  await page.goto(`${base}/shores/new`); await page.getByLabel('Name').waitFor();
  await shot('shore-new');
  await page.goto(`${base}/tide-tables`); await page.getByRole('heading', { name: 'Add an official table' }).waitFor();
  await shot('tables');
  await context.close();
}
await browser.close();
