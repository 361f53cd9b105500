import type { Read } from '#backend/database/transaction.ts';
import type { PlanWindowRules } from '#shared/domain/seasons/plan-window.ts';
import type { SeasonPlanId, SessionId, ShoreId, SlotKindId } from '#shared/kernel/ids.ts';
import type { CalendarDay, ClockTime } from '#shared/kernel/time.ts';

/** What a season plan says. */
export interface PlanValues {
  readonly name: string;
  readonly shoreId: ShoreId;
  /** A recurrence rule as RFC 5545 writes it. */
  readonly pattern: string;
  readonly fromOn: CalendarDay;
  readonly toOn: CalendarDay;
  readonly minutesBeforeLow: number;
  readonly minutesAfterLow: number;
  readonly daylightMarginMinutes: number;
  readonly minimumMinutes: number;
  readonly earliestClock: ClockTime;
  readonly latestClock: ClockTime;
  readonly lowestLevelM: number | null;
  readonly slots: readonly { readonly slotKindId: SlotKindId; readonly count: number }[];
  readonly exceptions: readonly {
    readonly on: CalendarDay;
    readonly kind: 'skip' | 'take' | 'add';
    readonly reason: string | null;
  }[];
}

/** What a plan asks of its windows beyond its shore. */
export function windowRulesOf(plan: PlanValues): PlanWindowRules {
  return {
    planLevelM: plan.lowestLevelM,
    earliestClock: plan.earliestClock,
    latestClock: plan.latestClock,
    minutesBeforeLow: plan.minutesBeforeLow,
    minutesAfterLow: plan.minutesAfterLow,
    daylightMarginMinutes: plan.daylightMarginMinutes,
    minimumMinutes: plan.minimumMinutes,
  };
}

/** A session made of a plan. */
export interface PlannedSession {
  readonly id: SessionId;
  readonly plannedOn: CalendarDay;
  readonly state: 'draft' | 'published' | 'stood-down' | 'closed';
}

export interface Plan extends PlanValues {
  readonly id: SeasonPlanId;
  readonly sessions: readonly PlannedSession[];
}

const planSql = `
  SELECT json_build_object(
      'id', p.id, 'name', p.name, 'shoreId', p.shore_id, 'pattern', p.pattern,
      'fromOn', p.from_on, 'toOn', p.to_on, 'minutesBeforeLow', p.minutes_before_low,
      'minutesAfterLow', p.minutes_after_low, 'daylightMarginMinutes', p.daylight_margin_minutes,
      'minimumMinutes', p.minimum_minutes, 'earliestClock', p.earliest_clock,
      'latestClock', p.latest_clock, 'lowestLevelM', p.lowest_level_m,
      'slots', coalesce((
        SELECT json_agg(json_build_object('slotKindId', s.slot_kind_id, 'count', s.count)
                 ORDER BY k.position)
          FROM season_plan_slot s JOIN slot_kind k ON k.id = s.slot_kind_id
         WHERE s.season_plan_id = p.id), '[]'),
      'exceptions', coalesce((
        SELECT json_agg(json_build_object('on', e.on_day, 'kind', e.kind, 'reason', e.reason)
                 ORDER BY e.on_day)
          FROM season_plan_exception e WHERE e.season_plan_id = p.id), '[]'),
      'sessions', coalesce((
        SELECT json_agg(json_build_object('id', s.id, 'plannedOn', s.planned_on, 'state', s.state)
                 ORDER BY s.planned_on)
          FROM session s WHERE s.season_plan_id = p.id), '[]')) AS plan
    FROM season_plan p`;

/** Every season plan, the latest first. */
export async function readPlans(read: Read): Promise<readonly Plan[]> {
  const rows: { plan: Plan }[] = await read.query(`${planSql} ORDER BY p.to_on DESC, p.name, p.id`);
  return rows.map((row) => row.plan);
}

/** One plan; null when there is none of this id. */
export async function readPlan(read: Read, id: SeasonPlanId): Promise<Plan | null> {
  const rows: { plan: Plan }[] = await read.query(`${planSql} WHERE p.id = $1`, [id]);
  return rows[0]?.plan ?? null;
}

/** The slot kinds that a session may have, in the group's order. */
export async function readSlotKinds(
  read: Read,
): Promise<readonly { readonly id: SlotKindId; readonly name: string }[]> {
  return read.query('SELECT id, name FROM slot_kind ORDER BY position, name');
}
