import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { planPreview, planView, readPattern, seePlans } from '#shared/contracts/season-plans.ts';
import type { PlanSettings, PlanView } from '#shared/contracts/season-plans.ts';
import { seeCalendar } from '#shared/contracts/sessions.ts';
import { problem } from '#shared/contracts/problem.ts';
import type { ShoreId, SlotKindId } from '#shared/kernel/ids.ts';
import { clockAt, fromIso } from '#shared/kernel/time.ts';
import { given } from '../support/given.ts';
import { startTestApp } from '../support/test-app.ts';
import type { Requests, TestApp } from '../support/test-app.ts';

let app: TestApp;
let coordinator: Requests;
let volunteer: Requests;
let shoreId: ShoreId;
let leader: SlotKindId;
let guide: SlotKindId;

beforeAll(async () => {
  app = await startTestApp();
  const make = given(app.ctx);
  coordinator = await app.as(await make.person({ roles: ['coordinator'] }));
  volunteer = await app.as(await make.person());
  shoreId = await make.shore('Gull Ledges');
  leader = await make.slotKind([], { name: 'Shore leader' });
  guide = await make.slotKind([], { name: 'Pool guide' });
});
afterAll(async () => {
  await app.close();
});

function settings(change: Partial<PlanSettings> = {}): PlanSettings {
  return {
    name: 'Saturday families',
    shoreId,
    pattern: 'FREQ=WEEKLY;BYDAY=SA',
    fromOn: '2027-05-01',
    toOn: '2027-10-23',
    minutesBeforeLow: 120,
    minutesAfterLow: 30,
    daylightMarginMinutes: 30,
    minimumMinutes: 90,
    earliestClock: '07:00',
    latestClock: '18:00',
    lowestLevelM: null,
    slots: [
      { slotKindId: leader, count: 1 },
      { slotKindId: guide, count: 2 },
    ],
    exceptions: [],
    ...change,
  };
}

async function preview(change: Partial<PlanSettings> = {}) {
  return planPreview.parse(
    (await coordinator.post('/api/season-plans/preview', settings(change))).body,
  );
}

async function keep(change: Partial<PlanSettings> = {}): Promise<PlanView> {
  return planView.parse((await coordinator.post('/api/season-plans', settings(change))).body);
}

describe('a season plan', () => {
  it('is previewed date by date, taken with its window or skipped with the reason, and nothing is written', async () => {
    const seen = await preview();
    expect(seen.sentence).toBe('Every Saturday');
    expect(seen.nextDates).toEqual([
      '2027-05-01',
      '2027-05-08',
      '2027-05-15',
      '2027-05-22',
      '2027-05-29',
    ]);
    expect(seen.dates).toHaveLength(26);
    for (const date of seen.dates) {
      expect(date.isTaken).toBe(date.day.window !== null);
      expect(date.day.reasons.length > 0).toBe(!date.isTaken);
    }
    expect(seen.dates.filter(({ isTaken }) => isTaken).length).toBeGreaterThan(5);
    const list = seePlans.reply.parse((await coordinator.get('/api/season-plans')).body);
    expect(list.plans).toEqual([]);
  });

  it('takes, skips and adds dates by hand', async () => {
    const plain = await preview();
    const taken = plain.dates.find(({ isTaken }) => isTaken)?.on ?? '2027-05-01';
    const refused =
      plain.dates.find(({ isTaken, mayTake }) => !isTaken && mayTake)?.on ?? '2027-05-01';
    const byHand = await preview({
      exceptions: [
        { on: taken, kind: 'skip', reason: 'Village fair' },
        { on: refused, kind: 'take', reason: 'The school asked' },
        { on: '2027-06-06', kind: 'add', reason: null },
      ],
    });
    const on = (day: string) => byHand.dates.find((date) => date.on === day);
    expect(on(taken)).toMatchObject({
      isTaken: false,
      skippedBy: 'hand',
      handReason: 'Village fair',
    });
    expect(on(refused)).toMatchObject({
      isTaken: true,
      isByHand: true,
      handReason: 'The school asked',
    });
    expect(on('2027-06-06')).toMatchObject({ source: 'added' });
  });

  it('makes each taken date a draft session at its low water, once however often it is pressed, and publishes some', async () => {
    const plan = await keep({ name: 'Made once' });
    const path = `/api/season-plans/${plan.id}`;
    const replies = await Promise.all(
      [1, 2, 3].map(() => coordinator.post(`${path}/make-sessions`)),
    );
    expect(replies.map(({ status }) => status)).toEqual([200, 200, 200]);
    const made = planView.parse((await coordinator.get(path)).body);
    const taken = made.preview.dates.filter(({ isTaken }) => isTaken);
    expect(made.made).toBe(taken.length);
    expect(taken.every(({ sessionState }) => sessionState === 'draft')).toBe(true);

    const [first, second] = taken;
    const published = await coordinator.post(`${path}/publish`, {
      sessionIds: [first?.sessionId, second?.sessionId],
    });
    expect(planView.parse(published.body).published).toBe(2);

    const calendar = async (asked: Requests) =>
      seeCalendar.reply
        .parse((await asked.get('/api/calendar?from=2027-05-01&to=2027-06-30')).body)
        .sessions.filter(({ title }) => title === 'Made once');
    expect(await calendar(volunteer)).toHaveLength(2);
    const all = await calendar(coordinator);
    expect(all.length).toBeGreaterThan(2);
    const one = all.find(({ id }) => id === first?.sessionId);
    expect(one?.lowWaterAt).toBe(first?.day.window?.lowWaterAt);
    expect(one?.slots.map(({ slotKindName }) => slotKindName)).toEqual([
      'Shore leader',
      'Pool guide',
      'Pool guide',
    ]);
  });

  it('cannot be changed once sessions are made of it', async () => {
    const plan = await keep({ name: 'Fixed', pattern: 'FREQ=WEEKLY;BYDAY=SU' });
    const path = `/api/season-plans/${plan.id}`;
    const changed = await coordinator.put(path, settings({ name: 'Not yet fixed' }));
    expect(planView.parse(changed.body).settings.name).toBe('Not yet fixed');
    await coordinator.post(`${path}/make-sessions`);
    const late = await coordinator.put(path, settings({ name: 'Too late' }));
    expect(problem.parse(late.body)).toMatchObject({ status: 409, code: 'plan-refused' });
  });

  it('makes no session of a date whose crew would have met already', async () => {
    const plan = await keep({ name: 'From the past', fromOn: '2027-04-01', toOn: '2027-05-31' });
    const past = plan.preview.dates.filter(({ isPast }) => isPast);
    expect(past.length).toBeGreaterThan(0);
    const made = planView.parse(
      (await coordinator.post(`/api/season-plans/${plan.id}/make-sessions`)).body,
    );
    expect(
      made.preview.dates.filter(({ isPast, sessionId }) => isPast && sessionId !== null),
    ).toEqual([]);
  });

  it.each<[string, Partial<Record<keyof PlanSettings, unknown>>, string]>([
    ['a rule that cannot be read', { pattern: 'FREQ=WEEKLY;BYDAY=XX' }, 'pattern'],
    ['a rule by the second', { pattern: 'FREQ=SECONDLY' }, 'pattern'],
    ['days the wrong way round', { toOn: '2027-04-01' }, 'toOn'],
    ['a span of three years', { toOn: '2030-04-01' }, 'toOn'],
    ['no slot at all', { slots: [] }, 'slots'],
    ['hours the wrong way round', { latestClock: '06:00' }, 'latestClock'],
    ['a shore that does not exist', { shoreId: '00000000-0000-4000-8000-000000000000' }, 'shoreId'],
    [
      'two decisions for a day',
      {
        exceptions: [
          { on: '2027-05-01', kind: 'skip', reason: null },
          { on: '2027-05-01', kind: 'take', reason: null },
        ],
      },
      'exceptions',
    ],
  ])('is refused beside the field with %s', async (_words, change, field) => {
    const reply = await coordinator.post('/api/season-plans', { ...settings(), ...change });
    expect(reply.status).toBe(400);
    expect(problem.parse(reply.body).fields).toMatchObject([{ where: 'body', field }]);
  });

  it('holds every session within its hours, its level and daylight unless taken by hand', async () => {
    const seen = await preview({ lowestLevelM: 1.2, earliestClock: '09:00', latestClock: '15:00' });
    for (const { day, isTaken, isByHand } of seen.dates) {
      if (!isTaken || isByHand || day.window === null) continue;
      expect(day.window.lowWaterHeightM).toBeLessThanOrEqual(1.2);
      expect(clockAt(fromIso(day.window.startsAt), 'Europe/London') >= '09:00').toBe(true);
      expect(clockAt(fromIso(day.window.endsAt), 'Europe/London') <= '15:00').toBe(true);
      expect(fromIso(day.window.startsAt)).toBeGreaterThan(fromIso(day.sunriseAt ?? ''));
    }
  });

  it('reads any rule back as a sentence and its next five dates', async () => {
    const reply = await coordinator.post('/api/season-plans/read-pattern', {
      pattern: 'FREQ=MONTHLY;BYDAY=1SA,-1SA',
      fromOn: '2027-05-01',
    });
    expect(readPattern.reply.parse(reply.body).nextDates).toEqual([
      '2027-05-01',
      '2027-05-29',
      '2027-06-05',
      '2027-06-26',
      '2027-07-03',
    ]);
  });

  it('is for coordinators alone', async () => {
    expect((await volunteer.get('/api/season-plans')).status).toBe(403);
    expect((await volunteer.post('/api/season-plans', settings())).status).toBe(403);
  });
});
