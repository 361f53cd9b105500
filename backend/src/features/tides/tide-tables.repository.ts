import { SessionEntity } from '#backend/database/entities/session.entity.ts';
import { TideTableEntity } from '#backend/database/entities/tide-table.entity.ts';
import type { TideTableRow } from '#backend/database/entities/tide-table.entity.ts';
import type { Read, Tx } from '#backend/database/transaction.ts';
import type { WorkingWindow } from '#shared/domain/tides/working-window.ts';
import type { SeasonPlanId, SessionId, ShoreId, TideTableId } from '#shared/kernel/ids.ts';
import type { Instant } from '#shared/kernel/time.ts';

/** A table as lists show it. */
export interface TableListed {
  readonly id: TideTableId;
  readonly stationId: string;
  readonly name: string;
  readonly zone: string;
  readonly firstAt: Instant;
  readonly lastAt: Instant;
  readonly eventCount: number;
  readonly acceptedAt: Instant;
  readonly acceptedBy: string | null;
  readonly takenBackAt: Instant | null;
}

/** A session that lies ahead and stands at a low water. */
export interface SessionAtLow {
  readonly id: SessionId;
  readonly title: string;
  readonly shoreId: ShoreId;
  readonly seasonPlanId: SeasonPlanId | null;
  readonly lowWaterAt: Instant;
}

/** Every table, those in force first, then the latest. */
export async function readTables(read: Read): Promise<readonly TableListed[]> {
  const rows: { one: TableListed }[] = await read.query(
    `SELECT json_build_object('id', t.id, 'stationId', t.station_id, 'name', t.name, 'zone', t.zone,
         'firstAt', epoch_ms(t.first_at), 'lastAt', epoch_ms(t.last_at),
         'eventCount', jsonb_array_length(t.events), 'acceptedAt', epoch_ms(t.accepted_at),
         'acceptedBy', p.name, 'takenBackAt', epoch_ms(t.taken_back_at)) AS one
       FROM tide_table t JOIN person p ON p.id = t.accepted_by
      ORDER BY t.taken_back_at IS NOT NULL, t.accepted_at DESC, t.id`,
  );
  return rows.map((row) => row.one);
}

/** Sessions ahead, draft or published, whose low water falls between two instants, at these shores. */
export async function readSessionsAtLow(
  read: Read,
  shoreIds: readonly ShoreId[],
  fromAt: Instant,
  toAt: Instant,
): Promise<readonly SessionAtLow[]> {
  const rows: { one: SessionAtLow }[] = await read.query(
    `SELECT json_build_object('id', id, 'title', title, 'shoreId', shore_id,
         'seasonPlanId', season_plan_id, 'lowWaterAt', epoch_ms(low_water_at)) AS one
       FROM session
      WHERE shore_id = ANY ($1) AND state IN ('draft', 'published')
        AND low_water_at BETWEEN to_timestamp($2::double precision / 1000)
                             AND to_timestamp($3::double precision / 1000)
      ORDER BY low_water_at, id`,
    [shoreIds, fromAt, toAt],
  );
  return rows.map((row) => row.one);
}

export async function insertTable(tx: Tx, row: TideTableRow): Promise<void> {
  await tx.insert(TideTableEntity, row);
}

/** Takes a table out of force; whether it was in force until now. */
export async function markTakenBack(tx: Tx, id: TideTableId, takenBackAt: Date): Promise<boolean> {
  const [, changed]: [unknown, number] = await tx.query(
    'UPDATE tide_table SET taken_back_at = $2 WHERE id = $1 AND taken_back_at IS NULL',
    [id, takenBackAt],
  );
  return changed === 1;
}

/** Gives a session the times of another window. */
export async function moveToWindow(tx: Tx, id: SessionId, window: WorkingWindow): Promise<void> {
  await tx.update(
    SessionEntity,
    { id },
    {
      meetsAt: new Date(window.crewMeetsAt),
      partyMeetsAt: new Date(window.partyMeetsAt),
      startsAt: new Date(window.startsAt),
      endsAt: new Date(window.endsAt),
      lowWaterAt: new Date(window.lowWaterAt),
      lowWaterHeightM: window.lowWaterHeightM,
      lowerShoreClearBy: new Date(window.lowerShoreClearBy),
      offTheShoreBy: new Date(window.offTheShoreBy),
    },
  );
}
