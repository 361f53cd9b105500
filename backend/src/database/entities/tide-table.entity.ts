import { EntitySchema } from 'typeorm';
import type { PersonId, TideTableId } from '#shared/kernel/ids.ts';

/** An official tide table of a station. */
export interface TideTableRow {
  id: TideTableId;
  stationId: string;
  name: string;
  /** The zone in which it was printed, as the person who uploaded it said. */
  zone: string;
  firstAt: Date;
  lastAt: Date;
  /** Instant in milliseconds, kind, metres above chart datum; in order. */
  events: readonly (readonly [number, 'high' | 'low', number])[];
  acceptedAt: Date;
  acceptedBy: PersonId;
  takenBackAt: Date | null;
}

export const TideTableEntity = new EntitySchema<TideTableRow>({
  name: 'tide_table',
  columns: {
    id: { type: 'uuid', primary: true },
    stationId: { name: 'station_id', type: 'text' },
    name: { type: 'text' },
    zone: { type: 'text' },
    firstAt: { name: 'first_at', type: 'timestamptz' },
    lastAt: { name: 'last_at', type: 'timestamptz' },
    events: { type: 'jsonb' },
    acceptedAt: { name: 'accepted_at', type: 'timestamptz' },
    acceptedBy: { name: 'accepted_by', type: 'uuid' },
    takenBackAt: { name: 'taken_back_at', type: 'timestamptz', nullable: true },
  },
});
