import type { Read } from '#backend/database/transaction.ts';
import type { SessionId, ShoreId } from '#shared/kernel/ids.ts';
import type { CalendarDay, Instant } from '#shared/kernel/time.ts';

/** A session with its times, as everybody in the group may see it. */
export interface Session {
  readonly id: SessionId;
  readonly kind: 'shore' | 'training';
  readonly title: string;
  readonly state: 'draft' | 'published' | 'stood-down' | 'closed';
  readonly shoreId: ShoreId;
  readonly zone: string;
  readonly firstDayOn: CalendarDay;
  readonly crewMeetsAt: Instant;
  readonly partyMeetsAt: Instant;
  readonly startsAt: Instant;
  readonly lowWaterAt: Instant | null;
  readonly lowWaterHeightM: number | null;
  readonly lowerShoreClearBy: Instant | null;
  readonly offTheShoreBy: Instant | null;
  readonly endsAt: Instant;
}

const sessionSql = `
  SELECT json_build_object(
      'id', id, 'kind', kind, 'title', title, 'state', state, 'shoreId', shore_id, 'zone', zone,
      'firstDayOn', first_day, 'crewMeetsAt', epoch_ms(meets_at),
      'partyMeetsAt', epoch_ms(party_meets_at), 'startsAt', epoch_ms(starts_at),
      'lowWaterAt', epoch_ms(low_water_at), 'lowWaterHeightM', low_water_height_m,
      'lowerShoreClearBy', epoch_ms(lower_shore_clear_by),
      'offTheShoreBy', epoch_ms(off_the_shore_by), 'endsAt', epoch_ms(ends_at)) AS session
    FROM session`;

/** One session; null when there is none of this id. */
export async function readSession(read: Read, id: SessionId): Promise<Session | null> {
  const rows: { session: Session }[] = await read.query(`${sessionSql} WHERE id = $1`, [id]);
  return rows[0]?.session ?? null;
}

/** The sessions that touch a span of days, both ends included, in the order of their start. */
export async function readSessionsBetween(
  read: Read,
  fromOn: CalendarDay,
  toOn: CalendarDay,
  withDrafts: boolean,
): Promise<readonly Session[]> {
  const rows: { session: Session }[] = await read.query(
    `${sessionSql}
      WHERE first_day <= $2 AND last_day >= $1 AND (state <> 'draft' OR $3)
      ORDER BY starts_at, id`,
    [fromOn, toOn, withDrafts],
  );
  return rows.map((row) => row.session);
}

/** The next shore session that is open to parties (published or stood down) and has not ended. */
export async function readNextShoreSession(read: Read, now: Instant): Promise<Session | null> {
  const rows: { session: Session }[] = await read.query(
    `${sessionSql}
      WHERE kind = 'shore' AND state IN ('published', 'stood-down')
        AND ends_at > to_timestamp($1::double precision / 1000)
      ORDER BY starts_at, id LIMIT 1`,
    [now],
  );
  return rows[0]?.session ?? null;
}
