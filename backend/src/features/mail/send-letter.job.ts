import { z } from 'zod';
import { job } from '#backend/platform/jobs/job.ts';

/** Hands one letter of the outbox to the mail server. */
export const sendLetterJob = job({
  name: 'send-letter',
  payload: z.strictObject({ letterId: z.uuid() }),
  timetable: null,
});
