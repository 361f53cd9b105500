import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { coveringAward } from '#shared/domain/competencies/currency.ts';
import type { AwardId, CompetencyId, PersonId } from '#shared/kernel/ids.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { addDays } from '#shared/kernel/time.ts';
import { given } from '../support/given.ts';
import { startTestApp } from '../support/test-app.ts';
import type { TestApp } from '../support/test-app.ts';

const cases = 2000;
const base: CalendarDay = '2028-02-20';

let app: TestApp;
let personId: PersonId;
let competencyId: CompetencyId;

beforeAll(async () => {
  app = await startTestApp();
  const make = given(app.ctx);
  personId = await make.person();
  competencyId = await make.competency();
});
afterAll(async () => {
  await app.close();
});

const day = fc.integer({ min: 0, max: 20 }).map((days) => addDays(base, days));
const generated = fc.record({
  validFrom: day,
  validDays: fc.option(fc.integer({ min: 0, max: 15 }), { nil: null }),
  withdrawnOn: fc.option(day, { nil: null }),
  firstDayOn: day,
  isPastMidnight: fc.boolean(),
});

describe('the rule of currency and the guard of the database', () => {
  it(`say the same of ${cases} generated awards and sessions, round a leap day`, async () => {
    const samples = fc.sample(generated, { numRuns: cases, seed: 20270509 }).map((one) => ({
      ...one,
      id: app.ctx.newId<AwardId>(),
      expiresOn: one.validDays === null ? null : addDays(one.validFrom, one.validDays),
      lastDayOn: one.isPastMidnight ? addDays(one.firstDayOn, 1) : one.firstDayOn,
    }));
    const fromDatabase = await app.ctx.inTransaction(async (tx) => {
      await tx.query(
        `INSERT INTO award (id, person_id, competency_id, valid_from, expires_on, confirmed_at, withdrawn_on)
         SELECT s.id, $2, $3, s."validFrom", s."expiresOn", now(), s."withdrawnOn"
           FROM json_to_recordset($1) AS s(id uuid, "validFrom" date, "expiresOn" date, "withdrawnOn" date)`,
        [JSON.stringify(samples), personId, competencyId],
      );
      await app.ctx.recordTrail(tx, {
        actorId: null,
        action: 'award.given',
        recordKind: 'person',
        recordId: personId,
        details: {},
      });
      const rows: { id: AwardId; covers: boolean }[] = await tx.query(
        `SELECT s.id, award.valid @> s."firstDayOn" AND award.valid @> s."lastDayOn" AS covers
           FROM json_to_recordset($1) AS s(id uuid, "firstDayOn" date, "lastDayOn" date)
           JOIN award ON award.id = s.id`,
        [JSON.stringify(samples)],
      );
      return new Map(rows.map(({ id, covers }) => [id, covers]));
    });
    const different = samples.filter(({ id, firstDayOn, lastDayOn, ...award }) => {
      const rule = coveringAward([firstDayOn, lastDayOn], [{ id, isConfirmed: true, ...award }]);
      return (rule !== null) !== fromDatabase.get(id);
    });
    expect(different).toEqual([]);
    const covered = [...fromDatabase.values()].filter((covers) => covers).length;
    expect(covered).toBeGreaterThan(cases / 10);
    expect(covered).toBeLessThan((cases * 9) / 10);
  });
});
