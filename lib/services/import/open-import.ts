import { inTransaction } from '@/db/client';
import { findImportSettings } from '@/db/queries/import/import-batches';
import { authorise } from '@/lib/domain/access';
import { NO_SETTINGS, type ImportSettings } from '@/lib/domain/import';
import { importSettingsSchema } from '@/lib/schemas/import';
import type { ServiceContext } from '../context';
import { readImportSetup, type ImportSetup } from './read-import-setup';

export interface ImportView extends ImportSetup {
  /** How the last file of this site was read. */
  readonly settings: ImportSettings;
}

/** Everything the reading of a file needs. Settings of another make than today's are started over. */
export async function openImport({ actor }: ServiceContext): Promise<ImportView> {
  authorise(actor, 'booking.import');
  return inTransaction(actor.siteId, async (trx) => {
    const kept = importSettingsSchema.safeParse(await findImportSettings(trx, actor.siteId));
    return { ...(await readImportSetup(trx, actor.siteId)), settings: kept.success ? kept.data : NO_SETTINGS };
  });
}
