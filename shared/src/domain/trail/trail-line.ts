import type { Instant } from '../../kernel/time.ts';

/** What a line says beyond its columns: ids and field values, never names or contacts. */
export type TrailDetails = Readonly<Record<string, string | number | boolean | null>>;

/** What is known of a line before it is numbered. */
export interface TrailEntry {
  /** Null: the system itself, by its timetable. */
  readonly actorId: string | null;
  /** Noun and verb, for example `slot.claimed`. */
  readonly action: string;
  readonly recordKind: string;
  readonly recordId: string;
  readonly details: TrailDetails;
}

/** A numbered line with its link to the one before. */
export interface TrailLine extends TrailEntry {
  /** From 1, without gaps. */
  readonly seq: number;
  readonly at: Instant;
}

/** The link that stands before the first line. */
export const trailStart = 'start';

/**
 * The text over which a line's HMAC is taken: the previous line's HMAC and every field in a
 * fixed order, members of `details` by name, so that one line has exactly one text. A removed,
 * changed or exchanged line then no longer matches (R15).
 */
export function trailLineText(previousMac: string, line: TrailLine): string {
  const details = Object.keys(line.details)
    .sort()
    .map((name) => [name, line.details[name]]);
  return JSON.stringify([
    previousMac,
    line.seq,
    line.at,
    line.actorId,
    line.action,
    line.recordKind,
    line.recordId,
    details,
  ]);
}
