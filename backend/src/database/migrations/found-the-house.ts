import type { MigrationInterface, QueryRunner } from 'typeorm';

/**
 * The first schema: people, shores, sessions, slots, competencies, awards, claims with their
 * evidence, letters and the trail. There is no previous release to survive it.
 */
export class FoundTheHouse1796000000000 implements MigrationInterface {
  readonly name = 'FoundTheHouse1796000000000';

  async up(runner: QueryRunner): Promise<void> {
    for (const statement of [...tables, ...guards]) await runner.query(statement);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`
      DROP TABLE trail, letter, claim_evidence, claim, award, slot, session,
        slot_kind_requirement, competency, slot_kind, shore, person_role, person, sign_in_session`);
    await runner.query(`
      DROP FUNCTION check_claim_has_evidence, check_requirement_is_evidenced,
        check_change_is_on_trail, lock_claims_for_requirement, last_trail_line, epoch_ms`);
  }
}

const tables = [
  `CREATE EXTENSION IF NOT EXISTS btree_gist`,

  `CREATE FUNCTION epoch_ms(at timestamptz) RETURNS bigint LANGUAGE sql IMMUTABLE PARALLEL SAFE
     RETURN round(extract(epoch FROM at) * 1000)::bigint`,
  `COMMENT ON FUNCTION epoch_ms IS 'An instant as milliseconds since 1970-01-01 UTC, the way the rules count'`,

  `CREATE TABLE person (
     id uuid PRIMARY KEY,
     name text NOT NULL,
     email text NOT NULL,
     born_on date,
     state text NOT NULL,
     oidc_issuer text,
     oidc_subject text,
     created_at timestamptz NOT NULL,
     CONSTRAINT person_has_name CHECK (length(btrim(name)) BETWEEN 1 AND 200),
     CONSTRAINT person_email_lower_case CHECK (email = lower(email) AND email LIKE '%_@_%'),
     CONSTRAINT person_state_known CHECK (state IN ('invited', 'active', 'paused', 'left')),
     CONSTRAINT person_identity_whole CHECK ((oidc_issuer IS NULL) = (oidc_subject IS NULL)),
     CONSTRAINT person_one_per_email UNIQUE (email),
     CONSTRAINT person_one_per_identity UNIQUE (oidc_issuer, oidc_subject)
   )`,

  `CREATE TABLE person_role (
     person_id uuid NOT NULL REFERENCES person (id),
     role text NOT NULL,
     PRIMARY KEY (person_id, role),
     CONSTRAINT person_role_known CHECK (role IN ('coordinator', 'trainer', 'administrator'))
   )`,
  `COMMENT ON TABLE person_role IS 'Roles beyond volunteer, which everybody in the group holds'`,

  `CREATE TABLE shore (
     id uuid PRIMARY KEY,
     name text NOT NULL,
     position integer NOT NULL,
     zone text NOT NULL,
     latitude double precision NOT NULL,
     longitude double precision NOT NULL,
     tide_station_id text NOT NULL,
     lowest_tide_m double precision NOT NULL,
     highest_tide_m double precision NOT NULL,
     working_level_m double precision NOT NULL,
     cut_off_level_m double precision NOT NULL,
     minutes_before_low integer NOT NULL,
     minutes_after_low integer NOT NULL,
     daylight_margin_minutes integer NOT NULL,
     minimum_minutes integer NOT NULL,
     earliest_clock text NOT NULL,
     latest_clock text NOT NULL,
     crew_meets_minutes integer NOT NULL,
     party_meets_minutes integer NOT NULL,
     meeting_place text NOT NULL,
     CONSTRAINT shore_one_per_name UNIQUE (name),
     CONSTRAINT shore_position_on_earth CHECK (latitude BETWEEN -90 AND 90 AND longitude BETWEEN -180 AND 180),
     CONSTRAINT shore_tide_range CHECK (lowest_tide_m < highest_tide_m),
     CONSTRAINT shore_minutes_sane CHECK (
       minutes_before_low BETWEEN 0 AND 360 AND minutes_after_low BETWEEN 0 AND 360
       AND daylight_margin_minutes BETWEEN 0 AND 240 AND minimum_minutes BETWEEN 1 AND 720
       AND crew_meets_minutes BETWEEN 0 AND 240 AND party_meets_minutes BETWEEN 0 AND 240)
   )`,

  `CREATE TABLE slot_kind (
     id uuid PRIMARY KEY,
     name text NOT NULL,
     position integer NOT NULL,
     is_for_18_and_over boolean NOT NULL,
     CONSTRAINT slot_kind_one_per_name UNIQUE (name)
   )`,

  `CREATE TABLE competency (
     id uuid PRIMARY KEY,
     name text NOT NULL,
     position integer NOT NULL,
     validity_months integer,
     notice_days integer NOT NULL,
     how_to_get text NOT NULL,
     CONSTRAINT competency_one_per_name UNIQUE (name),
     CONSTRAINT competency_validity_sane CHECK (validity_months BETWEEN 1 AND 600),
     CONSTRAINT competency_notice_sane CHECK (notice_days BETWEEN 0 AND 730)
   )`,

  `CREATE TABLE slot_kind_requirement (
     slot_kind_id uuid NOT NULL REFERENCES slot_kind (id),
     competency_id uuid NOT NULL REFERENCES competency (id),
     added_at timestamptz NOT NULL,
     PRIMARY KEY (slot_kind_id, competency_id)
   )`,
  `COMMENT ON COLUMN slot_kind_requirement.added_at IS
     'The requirement binds every session whose crew meets after this instant; earlier duty was done under the rules of its day'`,

  `CREATE TABLE session (
     id uuid PRIMARY KEY,
     kind text NOT NULL,
     title text NOT NULL,
     state text NOT NULL,
     shore_id uuid NOT NULL REFERENCES shore (id),
     zone text NOT NULL,
     meets_at timestamptz NOT NULL,
     party_meets_at timestamptz NOT NULL,
     starts_at timestamptz NOT NULL,
     ends_at timestamptz NOT NULL,
     low_water_at timestamptz,
     low_water_height_m double precision,
     lower_shore_clear_by timestamptz,
     off_the_shore_by timestamptz,
     made_at timestamptz NOT NULL,
     during tstzrange NOT NULL GENERATED ALWAYS AS (tstzrange(meets_at, ends_at)) STORED,
     first_day date NOT NULL GENERATED ALWAYS AS ((meets_at AT TIME ZONE zone)::date) STORED,
     last_day date NOT NULL GENERATED ALWAYS AS ((ends_at AT TIME ZONE zone)::date) STORED,
     CONSTRAINT session_kind_known CHECK (kind IN ('shore', 'training')),
     CONSTRAINT session_state_known CHECK (state IN ('draft', 'published', 'stood-down', 'closed')),
     CONSTRAINT session_times_in_order CHECK (
       meets_at <= party_meets_at AND party_meets_at <= starts_at AND starts_at < ends_at),
     CONSTRAINT session_tide_whole CHECK (
       num_nonnulls(low_water_at, low_water_height_m, lower_shore_clear_by, off_the_shore_by) IN (0, 4)),
     CONSTRAINT session_shore_has_tide CHECK (kind <> 'shore' OR low_water_at IS NOT NULL),
     CONSTRAINT session_off_the_shore_in_time CHECK (
       starts_at <= lower_shore_clear_by AND lower_shore_clear_by <= off_the_shore_by
       AND off_the_shore_by <= ends_at),
     CONSTRAINT session_times_for_claims UNIQUE (id, during, first_day, last_day)
   )`,
  `CREATE INDEX session_by_day ON session (first_day, last_day)`,
  `COMMENT ON CONSTRAINT session_times_for_claims ON session IS
     'What claims copy and follow, so that a moved session is checked against its crew again'`,

  `CREATE TABLE slot (
     id uuid PRIMARY KEY,
     session_id uuid NOT NULL REFERENCES session (id),
     slot_kind_id uuid NOT NULL REFERENCES slot_kind (id),
     position integer NOT NULL,
     CONSTRAINT slot_position_once UNIQUE (session_id, position),
     CONSTRAINT slot_kind_for_claims UNIQUE (id, session_id, slot_kind_id)
   )`,

  `CREATE TABLE award (
     id uuid PRIMARY KEY,
     person_id uuid NOT NULL REFERENCES person (id),
     competency_id uuid NOT NULL REFERENCES competency (id),
     valid_from date NOT NULL,
     expires_on date,
     confirmed_by uuid REFERENCES person (id),
     confirmed_at timestamptz NOT NULL,
     withdrawn_on date,
     valid daterange NOT NULL GENERATED ALWAYS AS (
       CASE WHEN withdrawn_on IS NULL THEN daterange(valid_from, expires_on, '[]')
            ELSE daterange(valid_from, expires_on, '[]') * daterange(NULL, withdrawn_on) END) STORED,
     CONSTRAINT award_ends_after_it_starts CHECK (expires_on >= valid_from),
     CONSTRAINT award_never_by_oneself CHECK (confirmed_by <> person_id),
     CONSTRAINT award_for_evidence UNIQUE (id, person_id, competency_id, valid)
   )`,
  `CREATE INDEX award_by_person ON award (person_id, competency_id)`,
  `COMMENT ON COLUMN award.valid IS
     'The days on which the award counts. Withdrawing cuts it from that day on, so duty done before stays proven'`,

  `CREATE TABLE claim (
     id uuid PRIMARY KEY,
     slot_id uuid NOT NULL,
     session_id uuid NOT NULL,
     slot_kind_id uuid NOT NULL,
     person_id uuid NOT NULL REFERENCES person (id),
     during tstzrange NOT NULL,
     first_day date NOT NULL,
     last_day date NOT NULL,
     claimed_at timestamptz NOT NULL,
     released_at timestamptz,
     in_doubt_since timestamptz,
     CONSTRAINT claim_of_its_slot FOREIGN KEY (slot_id, session_id, slot_kind_id)
       REFERENCES slot (id, session_id, slot_kind_id),
     CONSTRAINT claim_follows_session FOREIGN KEY (session_id, during, first_day, last_day)
       REFERENCES session (id, during, first_day, last_day) ON UPDATE CASCADE,
     CONSTRAINT claim_no_overlap EXCLUDE USING gist (person_id WITH =, during WITH &&)
       WHERE (released_at IS NULL AND in_doubt_since IS NULL) DEFERRABLE INITIALLY IMMEDIATE,
     CONSTRAINT claim_for_evidence UNIQUE (id, person_id, first_day, last_day)
   )`,
  `CREATE UNIQUE INDEX claim_one_live_per_slot ON claim (slot_id) WHERE released_at IS NULL`,
  `CREATE INDEX claim_by_session ON claim (session_id)`,
  `CREATE INDEX claim_by_person ON claim (person_id) WHERE released_at IS NULL`,
  `COMMENT ON INDEX claim_one_live_per_slot IS 'R4: one holder a slot'`,
  `COMMENT ON CONSTRAINT claim_no_overlap ON claim IS
     'R4: no two live, sound claims of one person at overlapping times. Deferrable, so that a move can settle its doubts before the check'`,
  `COMMENT ON CONSTRAINT claim_follows_session ON claim IS
     'A moved session moves its claims, and so has them checked again'`,

  `CREATE TABLE claim_evidence (
     claim_id uuid NOT NULL,
     person_id uuid NOT NULL,
     competency_id uuid NOT NULL,
     award_id uuid NOT NULL,
     valid daterange NOT NULL,
     first_day date NOT NULL,
     last_day date NOT NULL,
     PRIMARY KEY (claim_id, competency_id),
     CONSTRAINT claim_evidence_of_claim FOREIGN KEY (claim_id, person_id, first_day, last_day)
       REFERENCES claim (id, person_id, first_day, last_day) ON UPDATE CASCADE,
     CONSTRAINT claim_evidence_by_award FOREIGN KEY (award_id, person_id, competency_id, valid)
       REFERENCES award (id, person_id, competency_id, valid) ON UPDATE CASCADE,
     CONSTRAINT claim_evidence_covers_session CHECK (valid @> first_day AND valid @> last_day)
   )`,
  `CREATE INDEX claim_evidence_by_award_id ON claim_evidence (award_id)`,
  `COMMENT ON CONSTRAINT claim_evidence_covers_session ON claim_evidence IS
     'R1: the award is valid on every local day that the session touches'`,

  `CREATE TABLE letter (
     id uuid PRIMARY KEY,
     kind text NOT NULL,
     about text NOT NULL,
     person_id uuid REFERENCES person (id),
     to_name text NOT NULL,
     to_address text NOT NULL,
     subject text NOT NULL,
     text_body text NOT NULL,
     html_body text NOT NULL,
     planned_at timestamptz NOT NULL,
     sent_at timestamptz,
     server_answer text,
     CONSTRAINT letter_planned_once UNIQUE (kind, about)
   )`,
  `COMMENT ON CONSTRAINT letter_planned_once ON letter IS 'R10: one letter of a kind about one thing, however often it is planned'`,

  `CREATE TABLE trail (
     seq bigint PRIMARY KEY,
     at timestamptz NOT NULL,
     actor_id uuid,
     action text NOT NULL,
     record_kind text NOT NULL,
     record_id uuid NOT NULL,
     details jsonb NOT NULL,
     mac text NOT NULL,
     written_in xid8 NOT NULL DEFAULT pg_current_xact_id(),
     CONSTRAINT trail_starts_at_one CHECK (seq >= 1)
   )`,
  `CREATE INDEX trail_by_record ON trail (record_id)`,
  `CREATE INDEX trail_by_session ON trail ((details ->> 'sessionId'))`,
  `CREATE INDEX trail_by_transaction ON trail (written_in)`,

  `CREATE TABLE sign_in_session (
     sid varchar PRIMARY KEY,
     sess json NOT NULL,
     expire timestamptz NOT NULL
   )`,
  `CREATE INDEX sign_in_session_by_expire ON sign_in_session (expire)`,
];

const guards = [
  // A live, sound claim has one evidence row for each competency that binds it.
  `CREATE FUNCTION check_claim_has_evidence() RETURNS trigger LANGUAGE plpgsql AS $$
   DECLARE
     checked uuid := CASE TG_TABLE_NAME
       WHEN 'claim' THEN (to_jsonb(NEW) ->> 'id')::uuid
       ELSE (to_jsonb(OLD) ->> 'claim_id')::uuid END;
     missing uuid;
   BEGIN
     SELECT r.competency_id INTO missing
       FROM claim c
       JOIN slot_kind_requirement r
         ON r.slot_kind_id = c.slot_kind_id AND r.added_at < lower(c.during)
      WHERE c.id = checked AND c.released_at IS NULL AND c.in_doubt_since IS NULL
        AND NOT EXISTS (SELECT FROM claim_evidence e
                         WHERE e.claim_id = c.id AND e.competency_id = r.competency_id)
      LIMIT 1;
     IF FOUND THEN
       RAISE EXCEPTION 'claim % has no award for competency %', checked, missing
         USING ERRCODE = 'check_violation', CONSTRAINT = 'claim_has_evidence';
     END IF;
     RETURN NULL;
   END $$`,
  `CREATE CONSTRAINT TRIGGER claim_has_evidence AFTER INSERT OR UPDATE ON claim
     DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_claim_has_evidence()`,
  `CREATE CONSTRAINT TRIGGER claim_keeps_evidence AFTER UPDATE OR DELETE ON claim_evidence
     DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_claim_has_evidence()`,
  `COMMENT ON TRIGGER claim_has_evidence ON claim IS
     'R1, R3: no live, sound claim without an award for each required competency'`,

  // A requirement waits until claims in flight are through, then sees them all.
  `CREATE FUNCTION lock_claims_for_requirement() RETURNS trigger LANGUAGE plpgsql AS $$
   BEGIN
     LOCK TABLE claim IN SHARE ROW EXCLUSIVE MODE;
     RETURN NULL;
   END $$`,
  `CREATE TRIGGER requirement_waits_for_claims BEFORE INSERT OR UPDATE ON slot_kind_requirement
     FOR EACH STATEMENT EXECUTE FUNCTION lock_claims_for_requirement()`,
  `CREATE FUNCTION check_requirement_is_evidenced() RETURNS trigger LANGUAGE plpgsql AS $$
   DECLARE
     lacking uuid;
   BEGIN
     SELECT c.id INTO lacking
       FROM claim c
      WHERE c.slot_kind_id = NEW.slot_kind_id AND NEW.added_at < lower(c.during)
        AND c.released_at IS NULL AND c.in_doubt_since IS NULL
        AND NOT EXISTS (SELECT FROM claim_evidence e
                         WHERE e.claim_id = c.id AND e.competency_id = NEW.competency_id)
      LIMIT 1;
     IF FOUND THEN
       RAISE EXCEPTION 'claim % has no award for the added competency %', lacking, NEW.competency_id
         USING ERRCODE = 'check_violation', CONSTRAINT = 'requirement_is_evidenced';
     END IF;
     RETURN NULL;
   END $$`,
  `CREATE CONSTRAINT TRIGGER requirement_is_evidenced AFTER INSERT OR UPDATE ON slot_kind_requirement
     DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_requirement_is_evidenced()`,

  // The lock is taken in one statement and the last line read in the next, whose snapshot is newer.
  `CREATE FUNCTION last_trail_line() RETURNS TABLE (seq bigint, mac text)
   LANGUAGE plpgsql VOLATILE AS $$
   BEGIN
     PERFORM pg_advisory_xact_lock(hashtext('trail'));
     RETURN QUERY SELECT t.seq, t.mac FROM trail t ORDER BY t.seq DESC LIMIT 1;
   END $$`,
  `COMMENT ON FUNCTION last_trail_line IS
     'Locks the end of the trail until this transaction ends and returns its last line, so that lines are numbered without gaps'`,

  // What the application changes, it puts on the trail in the same transaction. The owner's
  // maintenance (migrations, restoring a backup) is not the application.
  `CREATE FUNCTION check_change_is_on_trail() RETURNS trigger LANGUAGE plpgsql AS $$
   BEGIN
     IF EXISTS (SELECT FROM trail WHERE written_in = pg_current_xact_id()) THEN RETURN NULL; END IF;
     IF pg_has_role(session_user, (SELECT relowner FROM pg_class WHERE oid = TG_RELID), 'USAGE') THEN
       RETURN NULL;
     END IF;
     RAISE EXCEPTION 'a change to % is not on the trail', TG_TABLE_NAME
       USING ERRCODE = 'check_violation', CONSTRAINT = TG_TABLE_NAME || '_change_is_on_trail';
   END $$`,
  ...[
    'person',
    'person_role',
    'shore',
    'slot_kind',
    'competency',
    'slot_kind_requirement',
    'session',
    'slot',
    'award',
    'claim',
  ].map(
    (table) => `CREATE CONSTRAINT TRIGGER ${table}_change_is_on_trail
       AFTER INSERT OR UPDATE OR DELETE ON ${table}
       DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_change_is_on_trail()`,
  ),
];
