import type { AppContext, Letter, Tx } from '#backend/app-context.ts';
import type { LetterId } from '#shared/kernel/ids.ts';
import { planOnce } from './letters.repository.ts';
import { sendLetterJob } from './send-letter.job.ts';

/**
 * Puts a letter in the outbox and its sending in the queue, in the caller's transaction: both
 * are there if it commits, neither if not. Planned again, nothing happens.
 */
export async function postLetter(
  ctx: Pick<AppContext, 'clock' | 'newId' | 'enqueue'>,
  tx: Tx,
  letter: Letter,
): Promise<void> {
  const id = ctx.newId<LetterId>();
  const isNew = await planOnce(tx, {
    id,
    kind: letter.kind,
    about: letter.about,
    personId: letter.to.personId,
    toName: letter.to.name,
    toAddress: letter.to.address,
    subject: letter.subject,
    textBody: letter.text,
    htmlBody: letter.html,
    plannedAt: new Date(ctx.clock.now()),
    sentAt: null,
    serverAnswer: null,
  });
  if (isNew) await ctx.enqueue(tx, sendLetterJob, { letterId: id });
}
