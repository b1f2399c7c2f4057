import { inTransaction } from '@/db/client';
import { listStale, putOff } from '@/db/queries/pre-check/check-results';
import { authorise, systemActor } from '@/lib/domain/access';
import { enqueue, type JobPayload } from '@/lib/jobs';
import { checkBooking } from '../pre-check/check-booking';
import { refreshVerdict } from './refresh-booking-state';

/** Bookings of one job: a site with thousands to check takes turns with the others. */
const AT_A_TIME = 100;
const RETRY_MS = 5 * 60_000;

/**
 * Checks the bookings of a site whose check does not stand any more. Each is a transaction of its own, so a stop in
 * between loses nothing and a second run only goes on. One that cannot be checked waits and holds nobody up.
 * @returns how many were looked at
 */
export async function refreshBookings(job: JobPayload<'refresh-bookings'>, now: Date = new Date()): Promise<number> {
  const { siteId } = job;
  authorise(systemActor(siteId, 'refresh-bookings'), 'booking.check', { siteId });
  const due = await inTransaction(siteId, (trx) => listStale(trx, siteId, now, AT_A_TIME));
  for (const bookingId of due) {
    try {
      await inTransaction(siteId, async (trx) => {
        const checked = await checkBooking(trx, siteId, bookingId, now);
        if (checked === 'checked') await refreshVerdict(trx, { siteId, bookingId, now });
      });
    } catch (error) {
      console.error(`check of booking ${bookingId}: ${(error as Error).message}`);
      await inTransaction(siteId, (trx) => putOff(trx, siteId, bookingId, new Date(now.getTime() + RETRY_MS)));
    }
  }
  if (due.length === AT_A_TIME) await inTransaction(siteId, (trx) => enqueue(trx, 'refresh-bookings', { siteId }));
  return due.length;
}
