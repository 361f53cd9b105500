import { AxeBuilder } from '@axe-core/playwright';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchBrowser } from '../support/browser.ts';
import { eventually } from '../support/eventually.ts';
import { signInAs, visit } from '../support/visitor.ts';
import { startWholeSystem } from '../support/whole-system.ts';
import type { WholeSystem } from '../support/whole-system.ts';

let system: WholeSystem;
let browser: Browser;

beforeAll(async () => {
  system = await startWholeSystem();
  browser = await launchBrowser();
});
afterAll(async () => {
  await browser.close();
  await system.close();
});

const visitor = (size?: readonly [number, number], complaints: string[] = []) =>
  visit(browser, complaints, size);

/** The pages of the sessions that lie ahead, in their order. */
async function sessionPages(page: Page): Promise<string[]> {
  return page.evaluate(async () => {
    const day = (ahead: number) =>
      new Date(Date.now() + ahead * 86_400_000).toISOString().slice(0, 10);
    const reply = await fetch(`/api/calendar?from=${day(0)}&to=${day(55)}`);
    const calendar = (await reply.json()) as { sessions: { id: string }[] };
    return calendar.sessions.map(({ id }) => `/sessions/${id}`);
  });
}

describe('a volunteer', () => {
  it('signs in, is refused one leader slot in words, claims another, gets the letter; a coordinator sees it', async () => {
    const { context, page } = await visitor();
    await signInAs(page, system, 'Callum Marrack');
    await page.getByRole('heading', { level: 1, name: /\d{4}/ }).waitFor();
    const pages = await sessionPages(page);

    // Beyond the last valid day of his tide safety: refused with both reasons, each in words.
    await page.goto(system.baseUrl + (pages[4] ?? ''));
    const refused = page.getByRole('listitem').filter({ hasText: 'Shore leader' }).first();
    await refused.getByText('You may not claim this slot, for two reasons.').waitFor();
    const words = await refused.innerText();
    expect(words).toMatch(/Tide safety lapses on \d+ \w+.*six days before/);
    expect(words).toMatch(/First aid outdoors lapses on \d+ \w+.*one day before/);
    expect(await refused.getByRole('button', { name: /^Claim/ }).count()).toBe(0);

    // Within it: claimed with one press.
    await page.goto(system.baseUrl + (pages[1] ?? ''));
    const open = page.getByRole('listitem').filter({ hasText: 'Shore leader' }).first();
    await open.getByRole('button', { name: 'Claim this slot' }).click();
    await open.getByText('You', { exact: true }).waitFor();
    const title = await page.getByRole('heading', { level: 1 }).innerText();
    const shore = title.split(',')[0] ?? '';

    const letters = await eventually(async () =>
      (await system.lettersTo('callum.marrack@example.org')).filter((one) => one.includes(shore)),
    );
    expect(letters).toHaveLength(1);
    expect(letters[0]).toContain('Yours: shore leader');

    const coordinator = await visitor();
    await signInAs(coordinator.page, system, 'Ines Thackeray');
    await coordinator.page.getByRole('heading', { level: 1, name: /\d{4}/ }).waitFor();
    await coordinator.page.goto(system.baseUrl + (pages[1] ?? ''));
    const seen = coordinator.page.getByRole('listitem').filter({ hasText: 'Shore leader' }).first();
    await seen.getByText('Callum Marrack').waitFor();
    await coordinator.context.close();
    await context.close();
  });

  it('releases the slot again, after being asked', async () => {
    const { context, page } = await visitor([390, 844]);
    await signInAs(page, system, 'Callum Marrack');
    await page.getByRole('heading', { level: 1 }).waitFor();
    const pages = await sessionPages(page);
    await page.goto(system.baseUrl + (pages[1] ?? ''));
    const slot = page.getByRole('listitem').filter({ hasText: 'Shore leader' }).first();
    await slot.getByRole('button', { name: /^Release/ }).click();
    await page
      .getByRole('alertdialog')
      .getByRole('button', { name: /^Release/ })
      .click();
    await slot.getByRole('button', { name: 'Claim this slot' }).waitFor();
    await context.close();
  });

  it('ends both sessions by signing out: ours, and the one at the provider', async () => {
    const { context, page } = await visitor();
    await signInAs(page, system, 'Callum Marrack');
    await page.getByRole('heading', { level: 1, name: /\d{4}/ }).waitFor();
    const atProvider = async () =>
      (await context.cookies(system.issuer)).filter(({ name }) => name === 'ebbfolk_stand_in');
    expect((await atProvider()).length).toBeGreaterThan(0);
    await page.getByRole('button', { name: 'Sign out' }).click();
    await page.waitForURL(`${system.baseUrl}/sign-in`);
    const status = await page.evaluate(async () => {
      const reply = await fetch('/api/calendar?from=2027-05-01&to=2027-05-02');
      return reply.status;
    });
    expect(status).toBe(401);
    expect(await atProvider()).toEqual([]);
    await context.close();
  });
});

describe('somebody else', () => {
  it.each([
    ['Rafe Penhallow', 'not-invited'],
    ['Oona Birdsall', 'email-not-verified'],
  ])('%s is told why they are not let in (%s) and what to do', async (name, why) => {
    const { context, page } = await visitor();
    await signInAs(page, system, name);
    await page.waitForURL(`${system.baseUrl}/sign-in/refused?why=${why}`);
    await page.getByRole('heading', { level: 1 }).waitFor();
    const { person } = await page.evaluate(async () => {
      const reply = await fetch('/api/account');
      return (await reply.json()) as { person: unknown };
    });
    expect(person).toBeNull();
    await context.close();
  });

  it('who goes back from the provider without signing in can try again', async () => {
    const { context, page } = await visitor();
    await page.goto(system.baseUrl);
    await page.getByRole('link', { name: 'Sign in' }).click();
    await page.waitForURL((url) => url.origin === system.issuer);
    await page.getByRole('button', { name: /Go back/ }).click();
    await page.waitForURL(`${system.baseUrl}/sign-in/refused?why=failed`);
    await context.close();
  });
});

describe('every screen', () => {
  it.each([
    [1360, 900],
    [390, 844],
  ])(
    'at %d px has no fault that axe can find, does not scroll sideways, and says nothing in the console',
    async (width, height) => {
      /** What the console of any page said that it should not have. */
      const complaints: string[] = [];
      const { context, page } = await visitor([width, height], complaints);
      const findings: string[] = [];
      const look = async (where: string): Promise<void> => {
        const { violations } = await new AxeBuilder({ page }).analyze();
        findings.push(
          ...violations.map(({ id, nodes }) => `${where}: ${id} ${nodes[0]?.html ?? ''}`),
        );
        const spill = await page.evaluate(
          () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
        );
        if (spill > 0) findings.push(`${where}: ${spill} px too wide`);
      };
      await page.goto(`${system.baseUrl}/sign-in`);
      await page.getByRole('link', { name: 'Sign in' }).waitFor();
      await page.waitForLoadState('networkidle');
      await look('sign-in');
      await page.goto(`${system.baseUrl}/sign-in/refused?why=not-invited`);
      await page.getByRole('heading', { level: 1 }).waitFor();
      await look('refused');
      await signInAs(page, system, 'Callum Marrack');
      await page.getByRole('heading', { level: 1 }).waitFor();
      await page.waitForLoadState('networkidle');
      await look('calendar');
      const pages = await sessionPages(page);
      await page.goto(system.baseUrl + (pages[4] ?? ''));
      await page.getByText('You may not claim this slot').first().waitFor();
      await look('session');
      await page.goto(`${system.baseUrl}/nowhere`);
      await page.getByRole('heading', { level: 1 }).waitFor();
      await look('not found');
      expect(findings).toEqual([]);
      expect(complaints).toEqual([]);
      await context.close();
    },
  );
});
