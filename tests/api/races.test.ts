import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { problem } from '#shared/contracts/problem.ts';
import type { CompetencyId, PersonId, ShoreId, SlotKindId } from '#shared/kernel/ids.ts';
import { addDays } from '#shared/kernel/time.ts';
import { given } from '../support/given.ts';
import { startTestApp } from '../support/test-app.ts';
import type { TestApp } from '../support/test-app.ts';

const rivals = 50;
const rounds = 100;
const firstDay = '2027-06-01';

let app: TestApp;
let make: ReturnType<typeof given>;
let owner: pg.Client;
let tideSafety: CompetencyId;
let leader: SlotKindId;
let guide: SlotKindId;
let gullLedges: ShoreId;
let kettleReef: ShoreId;

beforeAll(async () => {
  app = await startTestApp();
  make = given(app.ctx);
  owner = new pg.Client({ connectionString: app.database.ownerUrl });
  await owner.connect();
  tideSafety = await make.competency('Tide safety');
  leader = await make.slotKind([tideSafety]);
  guide = await make.slotKind();
  gullLedges = await make.shore('Gull Ledges');
  kettleReef = await make.shore('Kettle Reef');
});
afterAll(async () => {
  await owner.end();
  await app.close();
});

describe('races on the real database', () => {
  it('lets one of fifty people at one slot win, and tells the others who has it', async () => {
    const people: PersonId[] = [];
    for (let index = 0; index < rivals; index += 1) people.push(await make.person());
    const { slots } = await make.session(gullLedges, firstDay, [guide]);
    const requests = await Promise.all(people.map((personId) => app.as(personId)));
    const replies = await Promise.all(
      requests.map((one) => one.post(`/api/slots/${slots[0]}/claim`)),
    );
    const statuses = replies.map(({ status }) => status).sort();
    expect(statuses).toEqual([200, ...Array.from({ length: rivals - 1 }, () => 409)]);
    for (const reply of replies.filter(({ status }) => status === 409)) {
      expect(problem.parse(reply.body).reasons).toMatchObject([{ why: 'slot-taken' }]);
    }
  });

  it('never gives one person two overlapping slots, in a hundred rounds', async () => {
    const outcomes: string[] = [];
    for (let round = 0; round < rounds; round += 1) {
      const on = addDays(firstDay, 1 + round);
      const requests = await app.as(await make.person());
      const one = await make.session(gullLedges, on, [guide]);
      const two = await make.session(kettleReef, on, [guide], { laterMinutes: 90 });
      const replies = await Promise.all(
        [one, two].map(({ slots }) => requests.post(`/api/slots/${slots[0]}/claim`)),
      );
      outcomes.push(
        replies
          .map(({ status }) => status)
          .sort()
          .join(' '),
      );
    }
    expect(new Set(outcomes)).toEqual(new Set(['200 409']));
    const { rows } = await owner.query<{ clashes: string }>(
      `SELECT count(*) AS clashes FROM claim a JOIN claim b
          ON a.person_id = b.person_id AND a.id < b.id AND a.during && b.during
       WHERE a.released_at IS NULL AND b.released_at IS NULL`,
    );
    expect(rows).toEqual([{ clashes: '0' }]);
  });

  it('never leaves a live, sound claim on a withdrawn award, in a hundred rounds', async () => {
    const outcomes = new Map<string, number>();
    for (let round = 0; round < rounds; round += 1) {
      const on = addDays(firstDay, 200 + round);
      const personId = await make.person();
      const awardId = await make.award(personId, tideSafety, '2027-01-01', '2028-12-31');
      const { slots } = await make.session(gullLedges, on, [leader]);
      const requests = await app.as(personId);
      // By SQL, as somebody would who repairs the data by hand and knows none of the rules.
      const withdraw = async (): Promise<string> => {
        await new Promise((resolve) => setTimeout(resolve, round % 12));
        return owner
          .query('UPDATE award SET withdrawn_on = $2 WHERE id = $1', [awardId, '2027-04-29'])
          .then(
            () => 'withdrawn',
            (error: unknown) => (error as pg.DatabaseError).constraint ?? String(error),
          );
      };
      const [reply, withdrawal] = await Promise.all([
        requests.post(`/api/slots/${slots[0]}/claim`),
        withdraw(),
      ]);
      const outcome = `${reply.status} ${withdrawal}`;
      outcomes.set(outcome, (outcomes.get(outcome) ?? 0) + 1);
    }
    const { rows } = await owner.query<{ unproven: string }>(
      `SELECT count(*) AS unproven FROM claim c
        WHERE c.released_at IS NULL AND c.in_doubt_since IS NULL
          AND EXISTS (
            SELECT FROM slot_kind_requirement r WHERE r.slot_kind_id = c.slot_kind_id
               AND NOT EXISTS (
                 SELECT FROM award a WHERE a.person_id = c.person_id
                    AND a.competency_id = r.competency_id
                    AND a.valid @> c.first_day AND a.valid @> c.last_day))`,
    );
    expect(rows).toEqual([{ unproven: '0' }]);
    // Whoever came first won; the other was refused by the rule or by the named guard.
    const allowed = new Set(['409 withdrawn', '200 claim_evidence_covers_session']);
    expect([...outcomes.keys()].filter((outcome) => !allowed.has(outcome))).toEqual([]);
    expect(outcomes.size).toBe(2);
  });
});
