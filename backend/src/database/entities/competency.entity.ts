import { EntitySchema } from 'typeorm';
import type { AwardId, CompetencyId, PersonId } from '#shared/kernel/ids.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';

/** Something a person can be trained and checked in. */
export interface CompetencyRow {
  id: CompetencyId;
  name: string;
  position: number;
  /** Null: it does not lapse. */
  validityMonths: number | null;
  noticeDays: number;
  /** What a person does who does not hold it or whose award lapses. */
  howToGet: string;
}

/** A person holds a competency from a day to a day, both included. */
export interface AwardRow {
  id: AwardId;
  personId: PersonId;
  competencyId: CompetencyId;
  validFrom: CalendarDay;
  /** The last valid day; null: no end. */
  expiresOn: CalendarDay | null;
  /** Null: brought in from the group's records before it used Ebbfolk. */
  confirmedBy: PersonId | null;
  confirmedAt: Date;
  /** The first day on which the award no longer counts. */
  withdrawnOn: CalendarDay | null;
}

export const CompetencyEntity = new EntitySchema<CompetencyRow>({
  name: 'competency',
  columns: {
    id: { type: 'uuid', primary: true },
    name: { type: 'text' },
    position: { type: 'integer' },
    validityMonths: { name: 'validity_months', type: 'integer', nullable: true },
    noticeDays: { name: 'notice_days', type: 'integer' },
    howToGet: { name: 'how_to_get', type: 'text' },
  },
});

export const AwardEntity = new EntitySchema<AwardRow>({
  name: 'award',
  columns: {
    id: { type: 'uuid', primary: true },
    personId: { name: 'person_id', type: 'uuid' },
    competencyId: { name: 'competency_id', type: 'uuid' },
    validFrom: { name: 'valid_from', type: 'date' },
    expiresOn: { name: 'expires_on', type: 'date', nullable: true },
    confirmedBy: { name: 'confirmed_by', type: 'uuid', nullable: true },
    confirmedAt: { name: 'confirmed_at', type: 'timestamptz' },
    withdrawnOn: { name: 'withdrawn_on', type: 'date', nullable: true },
  },
});
