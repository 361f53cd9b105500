import type { z } from 'zod';

/** The label of a job: its queue, what it carries, and its timetable if it has one. */
export interface Job<Payload extends z.ZodType = z.ZodType> {
  readonly name: string;
  readonly payload: Payload;
  /** A cron line in the group's zone; null: only when enqueued. */
  readonly timetable: string | null;
}

/** Keeps the exact types of a job's parts. */
export function job<Payload extends z.ZodType>(parts: Job<Payload>): Job<Payload> {
  return parts;
}
