import { EntitySchema } from 'typeorm';
import type { TrailDetails } from '#shared/domain/trail/trail-line.ts';
import type { PersonId } from '#shared/kernel/ids.ts';

/** One line of the trail. Written once, never changed. */
export interface TrailRow {
  seq: number;
  at: Date;
  actorId: PersonId | null;
  action: string;
  recordKind: string;
  recordId: string;
  details: TrailDetails;
  mac: string;
}

export const TrailEntity = new EntitySchema<TrailRow>({
  name: 'trail',
  columns: {
    seq: { type: 'bigint', primary: true },
    at: { type: 'timestamptz' },
    actorId: { name: 'actor_id', type: 'uuid', nullable: true },
    action: { type: 'text' },
    recordKind: { name: 'record_kind', type: 'text' },
    recordId: { name: 'record_id', type: 'uuid' },
    details: { type: 'jsonb' },
    mac: { type: 'text' },
  },
});
