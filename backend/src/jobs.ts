import type { AppContext } from './app-context.ts';
import { sendLetterJob } from './features/mail/send-letter.job.ts';
import { sendLetter } from './features/mail/send-letter.ts';
import type { JobWork } from './platform/jobs/job-queue.ts';
import type { LetterId } from '#shared/kernel/ids.ts';

/** Every job with its work. A new job is added here and nowhere else. */
export function jobs(ctx: AppContext): JobWork[] {
  return [
    {
      job: sendLetterJob,
      work: ({ letterId }: { letterId: string }) => sendLetter(ctx, letterId as LetterId),
    },
  ];
}

/** The queues that the owner creates before the application starts. */
export const queueNames: readonly string[] = [sendLetterJob.name];
