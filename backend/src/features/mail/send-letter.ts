import type { AppContext } from '#backend/app-context.ts';
import type { LetterId } from '#shared/kernel/ids.ts';
import { lockUnsent, markSent } from './letters.repository.ts';

/**
 * Sends a letter unless it is sent. The row stays locked while the server takes it, so a doubled
 * job sends nothing twice; a crash between the server's yes and the commit repeats the letter
 * with the same Message-ID (R10).
 */
export async function sendLetter(ctx: AppContext, letterId: LetterId): Promise<void> {
  await ctx.inTransaction(async (tx) => {
    const letter = await lockUnsent(tx, letterId);
    if (letter === null) return;
    const answer = await ctx.mailer.send({
      messageId: `<${letter.id}@${new URL(ctx.group.baseUrl).hostname}>`,
      to: { name: letter.toName, address: letter.toAddress },
      subject: letter.subject,
      text: letter.textBody,
      html: letter.htmlBody,
    });
    await markSent(tx, letter.id, new Date(ctx.clock.now()), answer);
  });
}
