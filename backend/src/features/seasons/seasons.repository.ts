import {
  SeasonPlanEntity,
  SeasonPlanExceptionEntity,
  SeasonPlanSlotEntity,
} from '#backend/database/entities/season-plan.entity.ts';
import { SessionEntity, SlotEntity } from '#backend/database/entities/session.entity.ts';
import type { SessionRow, SlotRow } from '#backend/database/entities/session.entity.ts';
import type { Tx } from '#backend/database/transaction.ts';
import type { SeasonPlanId, SessionId } from '#shared/kernel/ids.ts';
import type { PlanValues } from './seasons.reader.ts';

/** Locks a plan, so that two who change it or make its sessions come one after the other. */
export async function lockPlan(tx: Tx, id: SeasonPlanId): Promise<void> {
  await tx.query('SELECT id FROM season_plan WHERE id = $1 FOR UPDATE', [id]);
}

export async function insertPlan(
  tx: Tx,
  id: SeasonPlanId,
  values: PlanValues,
  madeAt: Date,
): Promise<void> {
  const { slots, exceptions, ...plan } = values;
  await tx.insert(SeasonPlanEntity, { ...plan, id, madeAt });
  await insertParts(tx, id, { slots, exceptions });
}

export async function updatePlan(tx: Tx, id: SeasonPlanId, values: PlanValues): Promise<void> {
  const { slots, exceptions, ...plan } = values;
  await tx.update(SeasonPlanEntity, { id }, plan);
  await tx.delete(SeasonPlanSlotEntity, { seasonPlanId: id });
  await tx.delete(SeasonPlanExceptionEntity, { seasonPlanId: id });
  await insertParts(tx, id, { slots, exceptions });
}

async function insertParts(
  tx: Tx,
  seasonPlanId: SeasonPlanId,
  { slots, exceptions }: Pick<PlanValues, 'slots' | 'exceptions'>,
): Promise<void> {
  const wanted = slots.filter(({ count }) => count > 0);
  await tx.insert(
    SeasonPlanSlotEntity,
    wanted.map((slot) => ({ ...slot, seasonPlanId })),
  );
  if (exceptions.length === 0) return;
  await tx.insert(
    SeasonPlanExceptionEntity,
    exceptions.map(({ on, kind, reason }) => ({ seasonPlanId, onDay: on, kind, reason })),
  );
}

/** Inserts sessions with their slots. */
export async function insertSessions(
  tx: Tx,
  sessions: readonly SessionRow[],
  slots: readonly SlotRow[],
): Promise<void> {
  if (sessions.length === 0) return;
  await tx.insert(SessionEntity, [...sessions]);
  await tx.insert(SlotEntity, [...slots]);
}

/** Publishes those drafts of a plan among the given whose crew has not met; their ids. */
export async function publishDrafts(
  tx: Tx,
  planId: SeasonPlanId,
  sessionIds: readonly SessionId[],
  now: Date,
): Promise<readonly SessionId[]> {
  const [rows]: [{ id: SessionId }[], number] = await tx.query(
    `UPDATE session SET state = 'published'
      WHERE season_plan_id = $1 AND id = ANY ($2) AND state = 'draft' AND meets_at > $3
      RETURNING id`,
    [planId, sessionIds, now],
  );
  return rows.map(({ id }) => id);
}
