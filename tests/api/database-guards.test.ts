import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { databaseError } from '#backend/database/transaction.ts';
import type { Tx } from '#backend/database/transaction.ts';
import { ownerDataSource } from '#backend/database/data-source.ts';
import type { ClaimId, CompetencyId, PersonId, ShoreId, SlotKindId } from '#shared/kernel/ids.ts';
import { given } from '../support/given.ts';
import { startTestApp } from '../support/test-app.ts';
import type { TestApp } from '../support/test-app.ts';

let app: TestApp;
let make: ReturnType<typeof given>;
let tideSafety: CompetencyId;
let leader: SlotKindId;
let guide: SlotKindId;
let shore: ShoreId;

beforeAll(async () => {
  app = await startTestApp();
  make = given(app.ctx);
  tideSafety = await make.competency('Tide safety');
  leader = await make.slotKind([tideSafety]);
  guide = await make.slotKind();
  shore = await make.shore();
});
afterAll(async () => {
  await app.close();
});

/** Runs SQL as the application user with a trail line beside it; the constraint that refused, or null. */
async function refusal(
  work: (tx: Tx) => Promise<unknown>,
  withTrail = true,
): Promise<string | null> {
  try {
    await app.ctx.inTransaction(async (tx) => {
      await work(tx);
      if (!withTrail) return;
      const recordId = app.ctx.newId();
      await app.ctx.recordTrail(tx, {
        actorId: null,
        action: 'test.done',
        recordKind: 'test',
        recordId,
        details: {},
      });
    });
    return null;
  } catch (error) {
    const said = databaseError(error);
    if (said === null) throw error;
    return said.constraint ?? said.code;
  }
}

/** A claim put in by SQL, with no evidence unless given. */
function putClaim(tx: Tx, slotId: string, personId: PersonId, inDoubt = false): Promise<ClaimId> {
  const id = app.ctx.newId<ClaimId>();
  return tx
    .query(
      `INSERT INTO claim (id, slot_id, session_id, slot_kind_id, person_id, during, first_day,
                          last_day, claimed_at, in_doubt_since)
       SELECT $1, slot.id, session.id, slot.slot_kind_id, $3, session.during, session.first_day,
              session.last_day, now(), CASE WHEN $4 THEN now() END
         FROM slot JOIN session ON session.id = slot.session_id WHERE slot.id = $2`,
      [id, slotId, personId, inDoubt],
    )
    .then(() => id);
}

function putEvidence(tx: Tx, claimId: ClaimId, awardId: string): Promise<unknown> {
  return tx.query(
    `INSERT INTO claim_evidence (claim_id, person_id, competency_id, award_id, valid, first_day, last_day)
     SELECT claim.id, claim.person_id, award.competency_id, award.id, award.valid,
            claim.first_day, claim.last_day
       FROM claim, award WHERE claim.id = $1 AND award.id = $2`,
    [claimId, awardId],
  );
}

describe('whatever the code above does, the database', () => {
  it('refuses a live, sound claim without an award for each requirement', async () => {
    const personId = await make.person();
    const { slots } = await make.session(shore, '2027-06-01', [leader]);
    expect(await refusal((tx) => putClaim(tx, slots[0] ?? '', personId))).toBe(
      'claim_has_evidence',
    );
    expect(await refusal((tx) => putClaim(tx, slots[0] ?? '', personId, true))).toBeNull();
  });

  it('refuses evidence that does not cover the day, and evidence of somebody else', async () => {
    const [personId, other] = [await make.person(), await make.person()];
    const short = await make.award(personId, tideSafety, '2026-01-01', '2027-06-01');
    const foreign = await make.award(other, tideSafety, '2026-01-01', '2028-01-01');
    const { slots } = await make.session(shore, '2027-06-02', [leader]);
    const claimWith = (awardId: string) => async (tx: Tx) =>
      putEvidence(tx, await putClaim(tx, slots[0] ?? '', personId), awardId);
    expect(await refusal(claimWith(short))).toBe('claim_evidence_covers_session');
    expect(await refusal(claimWith(foreign))).toBe('claim_evidence_by_award');
  });

  it('refuses taking the evidence away from a claim, unless the claim goes in doubt with it', async () => {
    const personId = await make.person();
    const award = await make.award(personId, tideSafety, '2026-01-01', '2028-01-01');
    const { slots } = await make.session(shore, '2027-06-03', [leader]);
    let claimId = '' as ClaimId;
    await refusal(async (tx) => {
      claimId = await putClaim(tx, slots[0] ?? '', personId);
      await putEvidence(tx, claimId, award);
    });
    const drop = (tx: Tx) => tx.query('DELETE FROM claim_evidence WHERE claim_id = $1', [claimId]);
    expect(await refusal(drop)).toBe('claim_has_evidence');
    const withDoubt = async (tx: Tx) => {
      await tx.query('UPDATE claim SET in_doubt_since = now() WHERE id = $1', [claimId]);
      await drop(tx);
    };
    expect(await refusal(withDoubt)).toBeNull();
  });

  it('refuses withdrawing an award under a claim that stands on it, and keeps past duty proven', async () => {
    const personId = await make.person();
    const award = await make.award(personId, tideSafety, '2026-01-01', '2028-01-01');
    const { slots } = await make.session(shore, '2027-06-04', [leader]);
    await refusal(async (tx) => {
      await putEvidence(tx, await putClaim(tx, slots[0] ?? '', personId), award);
    });
    const withdraw = (on: string) => (tx: Tx) =>
      tx.query('UPDATE award SET withdrawn_on = $2 WHERE id = $1', [award, on]);
    expect(await refusal(withdraw('2027-06-04'))).toBe('claim_evidence_covers_session');
    expect(await refusal(withdraw('2027-06-05'))).toBeNull();
  });

  it('refuses moving a session past the last valid day of its leader', async () => {
    const personId = await make.person();
    const award = await make.award(personId, tideSafety, '2026-01-01', '2027-06-10');
    const { id, slots } = await make.session(shore, '2027-06-10', [leader]);
    await refusal(async (tx) => {
      await putEvidence(tx, await putClaim(tx, slots[0] ?? '', personId), award);
    });
    const move = (tx: Tx) =>
      tx.query(
        `UPDATE session SET meets_at = meets_at + interval '1 day', party_meets_at = party_meets_at + interval '1 day',
           starts_at = starts_at + interval '1 day', ends_at = ends_at + interval '1 day',
           low_water_at = low_water_at + interval '1 day',
           lower_shore_clear_by = lower_shore_clear_by + interval '1 day',
           off_the_shore_by = off_the_shore_by + interval '1 day' WHERE id = $1`,
        [id],
      );
    expect(await refusal(move)).toBe('claim_evidence_covers_session');
  });

  it('refuses two live claims at one slot, and overlapping claims of one person', async () => {
    const [one, two] = [await make.person(), await make.person()];
    const early = await make.session(shore, '2027-06-11', [guide, guide]);
    const late = await make.session(shore, '2027-06-11', [guide], { laterMinutes: 60 });
    expect(await refusal((tx) => putClaim(tx, early.slots[0] ?? '', one))).toBeNull();
    expect(await refusal((tx) => putClaim(tx, early.slots[0] ?? '', two))).toBe(
      'claim_one_live_per_slot',
    );
    expect(await refusal((tx) => putClaim(tx, late.slots[0] ?? '', one))).toBe('claim_no_overlap');
  });

  it('refuses an added requirement that a live claim does not meet', async () => {
    const personId = await make.person();
    const kind = await make.slotKind();
    const { slots } = await make.session(shore, '2027-06-12', [kind]);
    await refusal((tx) => putClaim(tx, slots[0] ?? '', personId));
    const require = (tx: Tx) =>
      tx.query(
        `INSERT INTO slot_kind_requirement (slot_kind_id, competency_id, added_at)
         VALUES ($1, $2, '2027-04-29T12:00:00Z')`,
        [kind, tideSafety],
      );
    expect(await refusal(require)).toBe('requirement_is_evidenced');
  });

  it('refuses an award that a person confirmed for themselves', async () => {
    const personId = await make.person();
    const confirm = (tx: Tx) =>
      tx.query(
        `INSERT INTO award (id, person_id, competency_id, valid_from, confirmed_by, confirmed_at)
         VALUES ($1, $2, $3, '2027-01-01', $2, now())`,
        [app.ctx.newId(), personId, tideSafety],
      );
    expect(await refusal(confirm)).toBe('award_never_by_oneself');
  });

  it('refuses the application every change to the trail but a new line', async () => {
    const forbidden = '42501';
    expect(await refusal((tx) => tx.query(`UPDATE trail SET action = 'x'`))).toBe(forbidden);
    expect(await refusal((tx) => tx.query('DELETE FROM trail'))).toBe(forbidden);
    expect(await refusal((tx) => tx.query('TRUNCATE trail'))).toBe(forbidden);
  });
});

describe('a change that is not on the trail', () => {
  /** Tables whose rows are no decision of anybody: what they hold follows from a trailed change. */
  const untrailed = ['claim_evidence', 'letter', 'migration', 'sign_in_session', 'trail'];

  it('is refused on every table that people decide about', async () => {
    const owner = await ownerDataSource(app.database.ownerUrl).initialize();
    try {
      const rows: { name: string; guarded: boolean }[] = await owner.query(
        `SELECT c.relname AS name, EXISTS (
             SELECT FROM pg_trigger t JOIN pg_proc f ON f.oid = t.tgfoid
              WHERE t.tgrelid = c.oid AND f.proname = 'check_change_is_on_trail'
                AND t.tgdeferrable AND t.tgenabled = 'O') AS guarded
           FROM pg_class c WHERE c.relkind = 'r' AND c.relnamespace = 'public'::regnamespace`,
      );
      expect(
        rows
          .filter(({ guarded }) => !guarded)
          .map(({ name }) => name)
          .sort(),
      ).toEqual(untrailed);
    } finally {
      await owner.destroy();
    }
  });

  it('does not commit: a person, a claim and a role without a line are refused', async () => {
    const personId = await make.person();
    const { slots } = await make.session(shore, '2027-06-13', [guide]);
    const rename = (tx: Tx) =>
      tx.query(`UPDATE person SET name = 'Somebody else' WHERE id = $1`, [personId]);
    const giveRole = (tx: Tx) =>
      tx.query(`INSERT INTO person_role VALUES ($1, 'administrator')`, [personId]);
    expect(await refusal(rename, false)).toBe('person_change_is_on_trail');
    expect(await refusal(giveRole, false)).toBe('person_role_change_is_on_trail');
    expect(await refusal((tx) => putClaim(tx, slots[0] ?? '', personId), false)).toBe(
      'claim_change_is_on_trail',
    );
    expect(await refusal(rename)).toBeNull();
  });
});

describe('entities and migrations', () => {
  /** Columns that PostgreSQL itself computes, so that no entity writes them. */
  const computed = [
    'award.valid',
    'session.during',
    'session.first_day',
    'session.last_day',
    'trail.written_in',
  ];

  it('agree: TypeORM would change no column', async () => {
    const owner = await ownerDataSource(app.database.ownerUrl).initialize();
    try {
      // TypeORM looks here for what it knows of computed columns, whether or not it made them.
      await owner.query(
        `CREATE TABLE typeorm_metadata (type varchar NOT NULL, database varchar, schema varchar,
           "table" varchar, name varchar, value text)`,
      );
      const { upQueries } = await owner.driver.createSchemaBuilder().log();
      const changes = upQueries
        .map(({ query }) => query)
        // Constraints, indexes and comments stand in migrations alone and have their own tests.
        .filter(
          (query) => !/ (DROP CONSTRAINT|IS NULL)\b|^DROP INDEX|typeorm_metadata/.test(query),
        );
      expect(changes.sort()).toEqual(
        computed.map((name) => {
          const [table, column] = name.split('.');
          return `ALTER TABLE "${table}" DROP COLUMN "${column}"`;
        }),
      );
    } finally {
      await owner.query('DROP TABLE IF EXISTS typeorm_metadata');
      await owner.destroy();
    }
  });

  it('go down and up again', async () => {
    const { cloneDatabase } = await import('../support/test-database.ts');
    const clone = await cloneDatabase();
    const owner = await ownerDataSource(clone.ownerUrl).initialize();
    try {
      for (let left = owner.migrations.length; left > 0; left -= 1) {
        await owner.undoLastMigration();
      }
      const left: { name: string }[] = await owner.query(
        `SELECT relname AS name FROM pg_class
          WHERE relkind = 'r' AND relnamespace = 'public'::regnamespace`,
      );
      expect(left).toEqual([{ name: 'migration' }]);
      await owner.runMigrations();
    } finally {
      await owner.destroy();
      await clone.drop();
    }
  });
});
