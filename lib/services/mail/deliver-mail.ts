import type { Database } from '@/db/client';
import { inTransaction } from '@/db/client';
import { recordFailure, recordSent, takeQueuedMail } from '@/db/queries/outbox';
import type { JobPayload } from '@/lib/jobs';
import type { MailTransport } from '@/lib/mail';
import { retryDelaySeconds, writeMail } from '@/lib/mail';
import { mailLink } from './mail-link';

export type Delivery = 'sent' | 'put back' | 'given up' | 'nothing to do';

/**
 * Sends one mail of the outbox. The row stays locked while the server is spoken to, so two workers never send it at
 * once; a worker that dies lets the lock go and the mail is sent again under the same Message-ID.
 */
export async function deliverMail(
  payload: JobPayload<'deliver-mail'>,
  transport: MailTransport,
  options: { readonly now?: Date; readonly db?: Database } = {},
): Promise<Delivery> {
  const { siteId, outboxId } = payload;
  const now = options.now ?? new Date();
  return inTransaction(
    siteId,
    async (trx) => {
      const mail = await takeQueuedMail(trx, siteId, outboxId, now);
      if (!mail) return 'nothing to do';
      try {
        if (!mail.address) throw new Error('The account this mail was for is disabled.');
        const text = writeMail(mail.kind, mail.payload, mail.siteName, mailLink(mail));
        await transport.send({ to: mail.address, messageId: mail.messageId, ...text });
      } catch (cause) {
        const seconds = retryDelaySeconds(mail.attempts + 1);
        const nextAttemptAt = seconds === null ? null : new Date(now.getTime() + seconds * 1000);
        await recordFailure(trx, siteId, mail.id, { error: String((cause as Error).message ?? cause), nextAttemptAt });
        return nextAttemptAt ? 'put back' : 'given up';
      }
      await recordSent(trx, siteId, mail.id, now);
      return 'sent';
    },
    options.db,
  );
}
