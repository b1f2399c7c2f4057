import type { SiteTransaction } from '@/db/client';
import { dayOf } from '@/lib/domain/site/local-day';
import { markStale, type StaleFilter } from '@/db/queries/pre-check/check-results';
import { enqueue } from '@/lib/jobs';

/** Something these bookings rest on changed: shown as stale from this transaction on, checked again in the background. */
export async function bookingsChanged(trx: SiteTransaction, siteId: string, bookingIds: readonly string[], now: Date): Promise<void> {
  if (bookingIds.length === 0) return;
  await markStale(trx, siteId, { bookingIds }, now);
  await enqueue(trx, 'refresh-bookings', { siteId });
}

/**
 * A scanner, a protocol, the policy or sessions changed: every booking from today on that may rest on it. A scanner is
 * also looked at for bookings on others, so it concerns them all.
 */
export async function setupChanged(
  trx: SiteTransaction,
  siteId: string,
  changed: Pick<StaleFilter, 'protocolId' | 'scannerId' | 'from' | 'before'>,
  now: Date,
): Promise<void> {
  const today = dayOf(now).from;
  const from = changed.from && changed.from > today ? changed.from : today;
  await markStale(trx, siteId, { ...changed, from }, now);
  await enqueue(trx, 'refresh-bookings', { siteId });
}
