import { afterEach, describe, expect, it } from 'vitest';
import { seedDemo } from '#backend/seeds/seed-demo.ts';
import { seePlans } from '#shared/contracts/season-plans.ts';
import { seeCalendar, seeSession } from '#shared/contracts/sessions.ts';
import type { PersonId } from '#shared/kernel/ids.ts';
import { addDays, dayAt, fromIso } from '#shared/kernel/time.ts';
import { startTestApp } from '../support/test-app.ts';
import type { TestApp } from '../support/test-app.ts';

let app: TestApp;

afterEach(async () => {
  await app.close();
});

async function personNamed(name: string): Promise<PersonId> {
  const rows = await app.ctx.reading<{ id: PersonId }[]>((read) =>
    read.query('SELECT id FROM person WHERE name = $1', [name]),
  );
  return rows[0]?.id as PersonId;
}

describe('the demo', () => {
  it.each(['2026-12-01', '2027-03-20', '2027-06-21', '2027-09-15'])(
    'made on %s has covered sessions, gaps, slots that Callum may lead and slots that he may not',
    async (today) => {
      app = await startTestApp();
      app.clock.setTo(fromIso(`${today}T12:00:00Z`));
      await seedDemo(app.ctx);
      await seedDemo(app.ctx);
      const callumId = await personNamed('Callum Marrack');
      // He signs in for the first time when he does; until then he is invited.
      await app.ctx.inTransaction(async (tx) => {
        await tx.query(`UPDATE person SET state = 'active'`);
        await app.ctx.recordTrail(tx, {
          actorId: null,
          action: 'person.activated',
          recordKind: 'person',
          recordId: callumId,
          details: {},
        });
      });
      const callum = await app.as(callumId);
      const from = dayAt(app.clock.now(), 'Europe/London');
      const reply = await callum.get(`/api/calendar?from=${from}&to=${addDays(from, 55)}`);
      const { sessions } = seeCalendar.reply.parse(reply.body);
      expect(sessions.length).toBeGreaterThanOrEqual(5);
      const page = async (place: number) =>
        seeSession.reply.parse(
          (await callum.get(`/api/sessions/${sessions[place]?.id ?? ''}`)).body,
        );
      expect((await page(0)).slots.every(({ state }) => state === 'claimed')).toBe(true);
      expect((await page(1)).slots[0]?.claim).toEqual({ isGranted: true });
      const refused = (await page(4)).slots[0]?.claim;
      expect(refused?.isGranted === false && refused.reasons.map(({ why }) => why)).toEqual([
        'competency-lapses',
        'competency-lapses',
      ]);
      const ines = await app.as(await personNamed('Ines Thackeray'));
      const { plans } = seePlans.reply.parse((await ines.get('/api/season-plans')).body);
      expect(plans.map(({ name }) => name).sort()).toEqual([
        'Saturday families',
        'School mornings',
      ]);
      expect(plans.every(({ made, published }) => made > published && published > 0)).toBe(true);
    },
  );
});
