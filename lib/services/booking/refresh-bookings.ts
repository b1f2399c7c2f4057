import { inTransaction } from '@/db/client';
import { listUnplannedBookingIds } from '@/db/queries/booking/bookings';
import { authorise, systemActor } from '@/lib/domain/access';
import type { JobPayload } from '@/lib/jobs';
import { refreshBookingState } from './refresh-booking-state';

/**
 * Works out again what lists show of the bookings from today on that rest on a scanner, a protocol or the policy.
 * Each booking is a transaction of its own, so a stop in between loses nothing and a second run only repeats.
 * A booking that has a plan shows the plan, which was worked out with what it names.
 * @returns how many were worked out
 */
export async function refreshBookings(job: JobPayload<'refresh-bookings'>, now: Date = new Date()): Promise<number> {
  const { siteId, scannerId, protocolId } = job;
  authorise(systemActor(siteId, 'refresh-bookings'), 'booking.check', { siteId });
  const from = new Date(`${now.toISOString().slice(0, 10)}T00:00:00Z`);
  const ids = await inTransaction(siteId, (trx) =>
    listUnplannedBookingIds(trx, siteId, {
      from,
      ...(scannerId ? { scannerId } : {}),
      ...(protocolId ? { protocolId } : {}),
    }),
  );
  for (const bookingId of ids) {
    await inTransaction(siteId, (trx) => refreshBookingState(trx, { siteId, bookingId, now }));
  }
  return ids.length;
}
