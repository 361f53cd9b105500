import pg from 'pg';
import { DataSource } from 'typeorm';
import { ClaimEntity, ClaimEvidenceEntity } from './entities/claim.entity.ts';
import { AwardEntity, CompetencyEntity } from './entities/competency.entity.ts';
import { LetterEntity } from './entities/letter.entity.ts';
import { PersonRoleEntity } from './entities/person-role.entity.ts';
import { PersonEntity } from './entities/person.entity.ts';
import { SessionEntity, SlotEntity } from './entities/session.entity.ts';
import { ShoreEntity } from './entities/shore.entity.ts';
import { SlotKindEntity, SlotKindRequirementEntity } from './entities/slot-kind.entity.ts';
import { TrailEntity } from './entities/trail.entity.ts';
import {
  SeasonPlanEntity,
  SeasonPlanExceptionEntity,
  SeasonPlanSlotEntity,
} from './entities/season-plan.entity.ts';
import { TideTableEntity } from './entities/tide-table.entity.ts';
import { FoundTheHouse1796000000000 } from './migrations/found-the-house.ts';
import { PlanSeasons1796100000000 } from './migrations/plan-seasons.ts';

const entities = [
  PersonEntity,
  PersonRoleEntity,
  ShoreEntity,
  SlotKindEntity,
  SlotKindRequirementEntity,
  CompetencyEntity,
  AwardEntity,
  SessionEntity,
  SlotEntity,
  ClaimEntity,
  ClaimEvidenceEntity,
  LetterEntity,
  TrailEntity,
  SeasonPlanEntity,
  SeasonPlanSlotEntity,
  SeasonPlanExceptionEntity,
  TideTableEntity,
];

const migrations = [FoundTheHouse1796000000000, PlanSeasons1796100000000];

// A plain date stays text ('2027-03-29'): as a Date it would shift with the zone of the process.
pg.types.setTypeParser(pg.types.builtins.DATE, (text) => text);

const statementTimeoutMs = 5_000;
const lockTimeoutMs = 2_000;
const idleInTransactionTimeoutMs = 10_000;

/**
 * The pool of the application user. A statement may take 5 s, a lock 2 s, and a transaction
 * may stand idle for 10 s; then PostgreSQL ends it.
 */
export function applicationDataSource(url: string, poolSize = 8): DataSource {
  return new DataSource({
    type: 'postgres',
    url,
    entities,
    poolSize,
    installExtensions: false,
    applicationName: 'ebbfolk',
    extra: {
      options: [
        `-c statement_timeout=${statementTimeoutMs}`,
        `-c lock_timeout=${lockTimeoutMs}`,
        `-c idle_in_transaction_session_timeout=${idleInTransactionTimeoutMs}`,
      ].join(' '),
    },
  });
}

/** The owner's connection, for migrations alone. */
export function ownerDataSource(url: string): DataSource {
  return new DataSource({
    type: 'postgres',
    url,
    entities,
    migrations,
    migrationsTableName: 'migration',
    poolSize: 2,
    installExtensions: false,
    applicationName: 'ebbfolk owner',
  });
}
