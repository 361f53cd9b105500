import type { MigrationInterface, QueryRunner } from 'typeorm';

/**
 * Shores know their differences, dangers and ratios; season plans and official tide tables come.
 * The previous release survives it: it reads and writes none of what is added, and every added
 * column has a default.
 */
export class PlanSeasons1796100000000 implements MigrationInterface {
  readonly name = 'PlanSeasons1796100000000';

  async up(runner: QueryRunner): Promise<void> {
    for (const statement of statements) await runner.query(statement);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('ALTER TABLE session DROP COLUMN season_plan_id, DROP COLUMN planned_on');
    await runner.query(
      'DROP TABLE tide_table, season_plan_exception, season_plan_slot, season_plan',
    );
    await runner.query(
      `ALTER TABLE shore ${shoreColumns.map((one) => `DROP COLUMN ${one.split(' ')[0] ?? ''}`).join(', ')}`,
    );
  }
}

const shoreColumns = [
  'high_later_minutes integer NOT NULL DEFAULT 0',
  'high_higher_m double precision NOT NULL DEFAULT 0',
  'low_later_minutes integer NOT NULL DEFAULT 0',
  'low_higher_m double precision NOT NULL DEFAULT 0',
  `hazards text NOT NULL DEFAULT ''`,
  `ways_off text NOT NULL DEFAULT ''`,
  `phone_signal text NOT NULL DEFAULT ''`,
  `emergency_words text NOT NULL DEFAULT ''`,
  `ratio_preset text NOT NULL DEFAULT 'families'`,
];

const onTrail = (table: string): string => `CREATE CONSTRAINT TRIGGER ${table}_change_is_on_trail
  AFTER INSERT OR UPDATE OR DELETE ON ${table}
  DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_change_is_on_trail()`;

const statements = [
  `ALTER TABLE shore ${shoreColumns.map((one) => `ADD COLUMN ${one}`).join(', ')}`,
  `ALTER TABLE shore
     ADD CONSTRAINT shore_differences_sane CHECK (
       high_later_minutes BETWEEN -360 AND 360 AND low_later_minutes BETWEEN -360 AND 360
       AND high_higher_m BETWEEN -10 AND 10 AND low_higher_m BETWEEN -10 AND 10),
     ADD CONSTRAINT shore_ratio_preset_known CHECK (ratio_preset IN ('schools', 'families', 'strict'))`,

  `CREATE TABLE season_plan (
     id uuid PRIMARY KEY,
     name text NOT NULL,
     shore_id uuid NOT NULL REFERENCES shore (id),
     pattern text NOT NULL,
     from_on date NOT NULL,
     to_on date NOT NULL,
     minutes_before_low integer NOT NULL,
     minutes_after_low integer NOT NULL,
     daylight_margin_minutes integer NOT NULL,
     minimum_minutes integer NOT NULL,
     earliest_clock text NOT NULL,
     latest_clock text NOT NULL,
     lowest_level_m double precision,
     made_at timestamptz NOT NULL,
     CONSTRAINT season_plan_days_in_order CHECK (from_on <= to_on),
     CONSTRAINT season_plan_minutes_sane CHECK (
       minutes_before_low BETWEEN 0 AND 360 AND minutes_after_low BETWEEN 0 AND 360
       AND daylight_margin_minutes BETWEEN 0 AND 240 AND minimum_minutes BETWEEN 1 AND 720)
   )`,
  onTrail('season_plan'),

  `CREATE TABLE season_plan_slot (
     season_plan_id uuid NOT NULL REFERENCES season_plan (id),
     slot_kind_id uuid NOT NULL REFERENCES slot_kind (id),
     count integer NOT NULL,
     PRIMARY KEY (season_plan_id, slot_kind_id),
     CONSTRAINT season_plan_slot_count_sane CHECK (count BETWEEN 1 AND 20)
   )`,
  onTrail('season_plan_slot'),

  `CREATE TABLE season_plan_exception (
     season_plan_id uuid NOT NULL REFERENCES season_plan (id),
     on_day date NOT NULL,
     kind text NOT NULL,
     reason text,
     PRIMARY KEY (season_plan_id, on_day),
     CONSTRAINT season_plan_exception_kind_known CHECK (kind IN ('skip', 'take', 'add'))
   )`,
  onTrail('season_plan_exception'),

  `ALTER TABLE session
     ADD COLUMN season_plan_id uuid REFERENCES season_plan (id),
     ADD COLUMN planned_on date,
     ADD CONSTRAINT session_plan_whole CHECK ((season_plan_id IS NULL) = (planned_on IS NULL)),
     ADD CONSTRAINT session_one_per_planned_day UNIQUE (season_plan_id, planned_on)`,
  `COMMENT ON CONSTRAINT session_one_per_planned_day ON session IS
     'R8: two presses on make sessions make each date once'`,

  `CREATE TABLE tide_table (
     id uuid PRIMARY KEY,
     station_id text NOT NULL,
     name text NOT NULL,
     zone text NOT NULL,
     first_at timestamptz NOT NULL,
     last_at timestamptz NOT NULL,
     events jsonb NOT NULL,
     accepted_at timestamptz NOT NULL,
     accepted_by uuid NOT NULL REFERENCES person (id),
     taken_back_at timestamptz,
     CONSTRAINT tide_table_in_order CHECK (first_at < last_at),
     CONSTRAINT tide_table_one_at_a_time EXCLUDE USING gist (
       station_id WITH =, tstzrange(first_at, last_at, '[]') WITH &&) WHERE (taken_back_at IS NULL)
   )`,
  onTrail('tide_table'),
  `COMMENT ON COLUMN tide_table.events IS
     'High and low waters in order: [instant in milliseconds since 1970 UTC, "high" or "low", metres above chart datum]'`,
  `COMMENT ON CONSTRAINT tide_table_one_at_a_time ON tide_table IS
     'R9: at any moment one official table counts for a station'`,
];
