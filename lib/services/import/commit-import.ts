import { inTransaction, type SiteTransaction } from '@/db/client';
import { closeImportBatch, lockImportBatch } from '@/db/queries/import/import-batches';
import { commitImportRows, countImportRows } from '@/db/queries/import/import-rows';
import { actorReference, authorise } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { enqueue } from '@/lib/jobs';
import { commitImportInput, type ImportDone } from '@/lib/schemas/import';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { nowOf, type ServiceContext } from '../context';

/** Books what is staged, in the transaction it is handed: all of it or nothing. */
export async function commitStaged(trx: SiteTransaction, context: ServiceContext, importId: string): Promise<ImportDone> {
  const { actor } = context;
  const { siteId } = actor;
  const at = nowOf(context);
  const done = await commitImportRows(trx, {
    siteId, batchId: importId, at, by: authorOf(actor), actor: actorReference(actor),
    source: actor.kind === 'token' ? 'api' : 'import',
  });
  await closeImportBatch(trx, siteId, importId, { status: 'committed', ...done, at });
  await recordAudit(trx, context, { action: 'booking.import', subjectType: 'import', subjectId: importId, fields: ['committed'] });
  await enqueue(trx, 'erase-staged-rows', { siteId });
  if (done.created + done.changed > 0) await enqueue(trx, 'refresh-bookings', { siteId });
  return { id: importId, ...done };
}

/**
 * Books an import in one transaction. Sent again because the answer was lost, it answers what was done; with another
 * number of rows than the sender staged, it does nothing.
 */
export async function commitImport(context: ServiceContext, input: unknown): Promise<ImportDone> {
  const { actor } = context;
  authorise(actor, 'booking.import');
  const { importId, expectedRows } = parseInput(commitImportInput, input);
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const batch = await lockImportBatch(trx, siteId, importId);
    authorise(actor, 'booking.import', batch);
    const { created, changed, same, status } = batch;
    if (status === 'committed') return { id: importId, created, changed, same };
    if (status === 'cancelled') throw new ServiceError('conflict', { message: 'This import was stopped. Start it again.' });
    const staged = await countImportRows(trx, siteId, importId);
    if (staged !== expectedRows) {
      throw new ServiceError('conflict', { message: `${staged} rows arrived, ${expectedRows} were sent. Nothing was booked; send the file again.` });
    }
    return commitStaged(trx, context, importId);
  });
}
