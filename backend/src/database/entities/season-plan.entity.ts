import { EntitySchema } from 'typeorm';
import type { SeasonPlanId, ShoreId, SlotKindId } from '#shared/kernel/ids.ts';
import type { CalendarDay, ClockTime } from '#shared/kernel/time.ts';

/** A plan from which the sessions of a season are made. */
export interface SeasonPlanRow {
  id: SeasonPlanId;
  name: string;
  shoreId: ShoreId;
  /** A recurrence rule as RFC 5545 writes it. */
  pattern: string;
  fromOn: CalendarDay;
  toOn: CalendarDay;
  minutesBeforeLow: number;
  minutesAfterLow: number;
  daylightMarginMinutes: number;
  minimumMinutes: number;
  earliestClock: ClockTime;
  latestClock: ClockTime;
  /** Null: the shore's working level. */
  lowestLevelM: number | null;
  madeAt: Date;
}

/** How many slots of a kind each session of a plan has. */
export interface SeasonPlanSlotRow {
  seasonPlanId: SeasonPlanId;
  slotKindId: SlotKindId;
  count: number;
}

/** A date of a plan that does not follow its pattern and rules. */
export interface SeasonPlanExceptionRow {
  seasonPlanId: SeasonPlanId;
  onDay: CalendarDay;
  kind: 'skip' | 'take' | 'add';
  reason: string | null;
}

export const SeasonPlanEntity = new EntitySchema<SeasonPlanRow>({
  name: 'season_plan',
  columns: {
    id: { type: 'uuid', primary: true },
    name: { type: 'text' },
    shoreId: { name: 'shore_id', type: 'uuid' },
    pattern: { type: 'text' },
    fromOn: { name: 'from_on', type: 'date' },
    toOn: { name: 'to_on', type: 'date' },
    minutesBeforeLow: { name: 'minutes_before_low', type: 'integer' },
    minutesAfterLow: { name: 'minutes_after_low', type: 'integer' },
    daylightMarginMinutes: { name: 'daylight_margin_minutes', type: 'integer' },
    minimumMinutes: { name: 'minimum_minutes', type: 'integer' },
    earliestClock: { name: 'earliest_clock', type: 'text' },
    latestClock: { name: 'latest_clock', type: 'text' },
    lowestLevelM: { name: 'lowest_level_m', type: 'double precision', nullable: true },
    madeAt: { name: 'made_at', type: 'timestamptz' },
  },
});

export const SeasonPlanSlotEntity = new EntitySchema<SeasonPlanSlotRow>({
  name: 'season_plan_slot',
  columns: {
    seasonPlanId: { name: 'season_plan_id', type: 'uuid', primary: true },
    slotKindId: { name: 'slot_kind_id', type: 'uuid', primary: true },
    count: { type: 'integer' },
  },
});

export const SeasonPlanExceptionEntity = new EntitySchema<SeasonPlanExceptionRow>({
  name: 'season_plan_exception',
  columns: {
    seasonPlanId: { name: 'season_plan_id', type: 'uuid', primary: true },
    onDay: { name: 'on_day', type: 'date', primary: true },
    kind: { type: 'text' },
    reason: { type: 'text', nullable: true },
  },
});
