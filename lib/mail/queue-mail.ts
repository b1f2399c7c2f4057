import { randomUUID } from 'node:crypto';
import type { SiteTransaction } from '@/db/client';
import { insertMail, type NewMail } from '@/db/queries/outbox';
import { environment } from '@/lib/env';
import { enqueue } from '@/lib/jobs';
import { MAIL_KINDS, type MailKind, type MailPayload } from './messages';

/**
 * Writes a mail to the outbox in the transaction of the event it tells of, and wakes the worker for it.
 * Its Message-ID is made here, once: however often it is sent, it stays the same message.
 */
export async function queueMail<Kind extends MailKind>(
  trx: SiteTransaction,
  siteId: string,
  mail: { readonly kind: Kind; readonly to: NewMail['to']; readonly payload: Omit<MailPayload<Kind>, 'schemaVersion'> },
): Promise<string> {
  const id = randomUUID();
  const payload = MAIL_KINDS[mail.kind].parse({ schemaVersion: 1, ...mail.payload });
  await insertMail(trx, siteId, {
    id,
    messageId: `<${id}@${new URL(environment().publicUrl).hostname}>`,
    kind: mail.kind,
    to: mail.to,
    payload,
  });
  await enqueue(trx, 'deliver-mail', { siteId, outboxId: id });
  return id;
}
