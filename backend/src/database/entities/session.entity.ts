import { EntitySchema } from 'typeorm';
import type { CalendarDay } from '#shared/kernel/time.ts';
import type { SeasonPlanId, SessionId, ShoreId, SlotId, SlotKindId } from '#shared/kernel/ids.ts';

/** One session: on a shore at a low water, or for training at a clock time. */
export interface SessionRow {
  id: SessionId;
  kind: 'shore' | 'training';
  title: string;
  state: 'draft' | 'published' | 'stood-down' | 'closed';
  shoreId: ShoreId;
  zone: string;
  meetsAt: Date;
  partyMeetsAt: Date;
  startsAt: Date;
  endsAt: Date;
  lowWaterAt: Date | null;
  lowWaterHeightM: number | null;
  lowerShoreClearBy: Date | null;
  offTheShoreBy: Date | null;
  madeAt: Date;
  /** The plan and the date of it from which the session was made; null: made by itself. */
  seasonPlanId: SeasonPlanId | null;
  plannedOn: CalendarDay | null;
}

/** A place in the crew of a session. */
export interface SlotRow {
  id: SlotId;
  sessionId: SessionId;
  slotKindId: SlotKindId;
  position: number;
}

export const SessionEntity = new EntitySchema<SessionRow>({
  name: 'session',
  columns: {
    id: { type: 'uuid', primary: true },
    kind: { type: 'text' },
    title: { type: 'text' },
    state: { type: 'text' },
    shoreId: { name: 'shore_id', type: 'uuid' },
    zone: { type: 'text' },
    meetsAt: { name: 'meets_at', type: 'timestamptz' },
    partyMeetsAt: { name: 'party_meets_at', type: 'timestamptz' },
    startsAt: { name: 'starts_at', type: 'timestamptz' },
    endsAt: { name: 'ends_at', type: 'timestamptz' },
    lowWaterAt: { name: 'low_water_at', type: 'timestamptz', nullable: true },
    lowWaterHeightM: { name: 'low_water_height_m', type: 'double precision', nullable: true },
    lowerShoreClearBy: { name: 'lower_shore_clear_by', type: 'timestamptz', nullable: true },
    offTheShoreBy: { name: 'off_the_shore_by', type: 'timestamptz', nullable: true },
    madeAt: { name: 'made_at', type: 'timestamptz' },
    seasonPlanId: { name: 'season_plan_id', type: 'uuid', nullable: true },
    plannedOn: { name: 'planned_on', type: 'date', nullable: true },
  },
});

export const SlotEntity = new EntitySchema<SlotRow>({
  name: 'slot',
  columns: {
    id: { type: 'uuid', primary: true },
    sessionId: { name: 'session_id', type: 'uuid' },
    slotKindId: { name: 'slot_kind_id', type: 'uuid' },
    position: { type: 'integer' },
  },
});
