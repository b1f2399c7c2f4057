import { inTransaction } from '@/db/client';
import { insertImportBatch, lockImportBatch, saveImportSettings } from '@/db/queries/import/import-batches';
import { authorise } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { type ImportStarted, startImportInput } from '@/lib/schemas/import';
import { parseInput } from '@/lib/schemas/parse-input';
import { authorOf } from '../author';
import { nowOf, type ServiceContext } from '../context';

/** Makes room for the rows of a file and keeps how it is read. Started twice under one id it is one import. */
export async function startImport(context: ServiceContext, input: unknown): Promise<ImportStarted> {
  const { actor } = context;
  authorise(actor, 'booking.import');
  const { id, format, settings } = parseInput(startImportInput, input);
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const fresh = await insertImportBatch(trx, { siteId, id, format, createdBy: authorOf(actor) });
    if (!fresh && (await lockImportBatch(trx, siteId, id))?.status !== 'staging') throw new ServiceError('not-found');
    if (settings) await saveImportSettings(trx, siteId, settings, { by: authorOf(actor), at: nowOf(context) });
    return { id };
  });
}
