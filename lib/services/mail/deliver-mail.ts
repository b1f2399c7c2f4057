import type { Database } from '@/db/client';
import { inTransaction } from '@/db/client';
import { recordFailure, recordSent, takeQueuedMail } from '@/db/queries/outbox';
import type { JobPayload } from '@/lib/jobs';
import type { MailTransport } from '@/lib/mail';
import { retryDelaySeconds, writeMail } from '@/lib/mail';
import { openAddress } from '../size-request/sealed-address';
import { mailLink } from './mail-link';

/** Mail servers repeat the address they refuse; a patient's is kept nowhere but sealed. */
const withoutAddress = (error: string, address: string | null): string =>
  address ? error.replaceAll(new RegExp(address.replace(/[\\^$.*+?()[\]{}|]/g, '\\$&'), 'gi'), '(the address)').replaceAll(/[^\s<>"']+@[^\s<>"']+/g, '(an address)') : error;

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
      const address = mail.sizeRequest ? openAddress(mail.sizeRequest.id, mail.sizeRequest.addressSealed) : mail.address;
      if (mail.sizeRequest && !address) {
        await recordFailure(trx, siteId, mail.id, { error: 'The size request had ended before this mail was sent.', nextAttemptAt: null });
        return 'given up';
      }
      try {
        if (!address) throw new Error('The account this mail was for is disabled.');
        const text = writeMail(mail.kind, mail.payload, mail.siteName, mailLink(mail));
        await transport.send({ to: address, messageId: mail.messageId, ...text });
      } catch (cause) {
        const seconds = retryDelaySeconds(mail.attempts + 1);
        const nextAttemptAt = seconds === null ? null : new Date(now.getTime() + seconds * 1000);
        await recordFailure(trx, siteId, mail.id, { error: withoutAddress(String((cause as Error).message ?? cause), mail.sizeRequest && address), nextAttemptAt });
        return nextAttemptAt ? 'put back' : 'given up';
      }
      await recordSent(trx, siteId, mail.id, now);
      return 'sent';
    },
    options.db,
  );
}
