import { inTransaction } from '@/db/client';
import { closeImportBatch, lockImportBatch } from '@/db/queries/import/import-batches';
import { authorise } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { enqueue } from '@/lib/jobs';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';

/** Gives up what is staged. What is committed stays. */
export async function cancelImport(context: ServiceContext, { id }: { readonly id: string }): Promise<void> {
  const { actor } = context;
  const { siteId } = actor;
  await inTransaction(siteId, async (trx) => {
    const batch = await lockImportBatch(trx, siteId, id);
    authorise(actor, 'booking.import', batch);
    if (batch.status === 'committed') throw new ServiceError('conflict', { message: 'This import is committed already.' });
    if (batch.status === 'cancelled') return;
    await closeImportBatch(trx, siteId, id, { status: 'cancelled', created: 0, changed: 0, same: 0, at: nowOf(context) });
    await enqueue(trx, 'erase-staged-rows', { siteId });
    await recordAudit(trx, context, { action: 'booking.import', subjectType: 'import', subjectId: id, fields: ['cancelled'] });
  });
}
