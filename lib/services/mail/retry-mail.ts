import { inTransaction } from '@/db/client';
import { lockMail, queueAgain } from '@/db/queries/outbox';
import { authorise } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { enqueue } from '@/lib/jobs';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { canGoAgain } from './list-mail';

/** Hands a mail that was given up, or waits for its next try, to the mail server again: the same message, its own Message-ID. */
export async function retryMail(context: ServiceContext, { id }: { readonly id: string }): Promise<void> {
  const { actor } = context;
  const { siteId } = actor;
  const now = nowOf(context);
  await inTransaction(siteId, async (trx) => {
    const mail = await lockMail(trx, siteId, id);
    authorise(actor, 'mail.retry', mail);
    if (mail.status === 'sent') throw new ServiceError('conflict', { message: 'This mail has been handed to the mail server meanwhile.' });
    if (!canGoAgain(mail, now)) {
      throw new ServiceError('conflict', { message: 'What this mail carries has run out. Ask for it anew where it was asked for.' });
    }
    await queueAgain(trx, siteId, id, now);
    await enqueue(trx, 'deliver-mail', { siteId, outboxId: id });
    await recordAudit(trx, context, { action: 'mail.retry', subjectType: 'mail', subjectId: id, fields: ['status'] });
  });
}
