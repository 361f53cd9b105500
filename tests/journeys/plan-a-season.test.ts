import { AxeBuilder } from '@axe-core/playwright';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { addDays, dayAt, weekdayOf } from '#shared/kernel/time.ts';
import { launchBrowser } from '../support/browser.ts';
import { signInAs, visit } from '../support/visitor.ts';
import { startWholeSystem } from '../support/whole-system.ts';
import type { WholeSystem } from '../support/whole-system.ts';

let system: WholeSystem;
let browser: Browser;
const complaints: string[] = [];

beforeAll(async () => {
  system = await startWholeSystem();
  browser = await launchBrowser();
});
afterAll(async () => {
  await browser.close();
  await system.close();
});

const saturday = 6;

/** The next Saturday but one, so that its session lies ahead whatever the hour. */
function firstSaturday(): CalendarDay {
  let on = addDays(dayAt(Date.now(), 'Europe/London'), 2);
  while (weekdayOf(on) !== saturday) on = addDays(on, 1);
  return on;
}

async function ask<Answer>(page: Page, path: string): Promise<Answer> {
  return page.evaluate(async (address) => {
    const reply = await fetch(address);
    return (await reply.json()) as Answer;
  }, path);
}

async function addShore(page: Page): Promise<void> {
  await page.goto(`${system.baseUrl}/shores/new`);
  await page.getByLabel('Name', { exact: true }).fill('Far Skerry');
  await page.getByLabel(/^Latitude/).fill('55.02');
  await page.getByLabel(/^Longitude/).fill('-1.20');
  await page
    .getByRole('radio', { name: /North Shields/ })
    .first()
    .check();
  const zone = page.getByLabel('Time zone');
  if ((await zone.inputValue()) === '') await zone.fill('Europe/London');
  await page.getByLabel(/^Working level/).fill('1.9');
  await page.getByLabel(/^Cut-off level/).fill('3');
  await page.getByText(/usable days in the year ahead/).waitFor();
  await page.getByLabel('Meeting place').fill('By the lamp post');
  await page.getByLabel(/^Emergency words/).fill('Dial the emergency number.');
  await page.getByRole('radio', { name: /Families/i }).check();
  await page.getByRole('button', { name: 'Add this shore' }).click();
  await page.waitForURL(/\/shores\/[0-9a-f-]{36}$/);
}

interface Plan {
  readonly made: number;
  readonly published: number;
  readonly preview: {
    readonly dates: readonly {
      readonly on: CalendarDay;
      readonly isTaken: boolean;
      readonly isByHand: boolean;
      readonly sessionId: string | null;
      readonly day: { readonly window: { readonly lowWaterAt: string } | null };
    }[];
  };
}

describe('a coordinator', () => {
  it('makes a shore, plans 26 Saturdays, takes one by hand, makes and publishes the sessions, and finds them at their low waters', async () => {
    const { context, page } = await visit(browser, complaints);
    await signInAs(page, system, 'Ines Thackeray');
    await page.getByRole('heading', { level: 1, name: /\d{4}/ }).waitFor();
    await addShore(page);

    const from = firstSaturday();
    const to = addDays(from, 25 * 7);
    await page.goto(`${system.baseUrl}/season-plans/new`);
    await page.getByLabel(/^Name/).fill('Far Saturdays');
    await page.getByLabel('Shore', { exact: true }).selectOption({ label: 'Far Skerry' });
    await page.getByLabel('From', { exact: true }).fill(from);
    await page.getByLabel('To', { exact: true }).fill(to);
    await page.getByRole('heading', { name: /^26 Saturdays: / }).waitFor();

    await page.getByRole('button', { name: /^Take/ }).first().click();
    await page.getByLabel('Reason, may be left empty').fill('The tide club asked');
    await page.getByLabel('Reason, may be left empty').press('Enter');
    await page
      .getByText(/by hand/)
      .first()
      .waitFor();

    await page.getByRole('button', { name: /^Make .* sessions?$/ }).click();
    await page.waitForURL(/\/season-plans\/[0-9a-f-]{36}$/);
    await page.getByRole('button', { name: /^Publish (all|the session)/ }).click();
    await page
      .getByRole('button', { name: /^Publish (all|the session)/ })
      .waitFor({ state: 'detached' });

    const planId = page.url().split('/').at(-1) ?? '';
    const plan = await ask<Plan>(page, `/api/season-plans/${planId}`);
    const taken = plan.preview.dates.filter(({ isTaken }) => isTaken);
    expect(plan.preview.dates).toHaveLength(26);
    expect(taken.filter(({ isByHand }) => isByHand)).toHaveLength(1);
    expect([plan.made, plan.published]).toEqual([taken.length, taken.length]);

    const calendar = await ask<{ sessions: { id: string; dayOn: string; lowWaterAt: string }[] }>(
      page,
      `/api/calendar?from=${from}&to=${addDays(from, 60)}`,
    );
    const first = taken.find(({ on }) => on <= addDays(from, 60));
    const found = calendar.sessions.find(({ id }) => id === first?.sessionId);
    expect(found?.lowWaterAt).toBe(first?.day.window?.lowWaterAt);

    await page.goto(`${system.baseUrl}/?month=${(first?.on ?? from).slice(0, 7)}`);
    await page
      .getByRole('link', { name: /^Far Skerry/ })
      .first()
      .waitFor();
    await context.close();
  });

  it.each([
    [1360, 900],
    [390, 844],
  ])(
    'sees the planning screens at %d px without a fault that axe can find and without sideways scroll',
    async (width, height) => {
      const { context, page } = await visit(browser, complaints, [width, height]);
      await signInAs(page, system, 'Ines Thackeray');
      await page.getByRole('heading', { level: 1 }).waitFor();
      const { plans } = await ask<{ plans: { id: string }[] }>(page, '/api/season-plans');
      const { shores } = await ask<{ shores: { id: string }[] }>(page, '/api/shores');
      const findings: string[] = [];
      for (const path of [
        '/season-plans',
        '/season-plans/new',
        `/season-plans/${plans[0]?.id ?? ''}`,
        '/shores',
        `/shores/${shores[0]?.id ?? ''}`,
        '/tide-tables',
      ]) {
        await page.goto(system.baseUrl + path);
        await page.getByRole('heading', { level: 1 }).waitFor();
        await page.waitForLoadState('networkidle');
        const { violations } = await new AxeBuilder({ page }).analyze();
        findings.push(
          ...violations.map(({ id, nodes }) => `${path}: ${id} ${nodes[0]?.html ?? ''}`),
        );
        const spill = await page.evaluate(
          () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
        );
        if (spill > 0) findings.push(`${path}: ${spill} px too wide`);
      }
      expect(findings).toEqual([]);
      expect(complaints).toEqual([]);
      await context.close();
    },
  );
});
