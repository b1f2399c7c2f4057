import { inTransaction } from '@/db/client';
import { eraseStagedRows } from '@/db/queries/import/import-batches';
import { authorise, systemActor } from '@/lib/domain/access';
import type { JobPayload } from '@/lib/jobs';

/**
 * The worker's: what a file brought is in the bookings by now, or will never be. All imports of the site that are over
 * are looked at, so that a job that was lost is made up for by the next. @returns how many rows were erased
 */
export async function eraseStaged({ siteId }: JobPayload<'erase-staged-rows'>): Promise<number> {
  authorise(systemActor(siteId, 'erase-staged-rows'), 'booking.import', { siteId });
  return inTransaction(siteId, (trx) => eraseStagedRows(trx, siteId));
}
