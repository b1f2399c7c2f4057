import { inTransaction } from '@/db/client';
import { listStale, putOff } from '@/db/queries/pre-check/check-results';
import { authorise, systemActor } from '@/lib/domain/access';
import { enqueue, type JobPayload } from '@/lib/jobs';
import { checkBooking } from '../pre-check/check-booking';
import { refreshVerdict } from './refresh-booking-state';

/** Bookings of one job: a site with thousands to check takes turns with the others. */
const IN_ONE_JOB = 100;
/** So few are picked at a time that a booking which was just changed, and is soon, waits for no longer list. */
const PICKED_AT_ONCE = 5;
const RETRY_MS = 5 * 60_000;

async function refreshOne(siteId: string, bookingId: string, now: Date): Promise<void> {
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

/**
 * Checks the bookings of a site whose check does not stand any more, the soonest scan first. Each is a transaction of
 * its own, so a stop in between loses nothing and a second run only goes on. One that cannot be checked waits and holds
 * nobody up.
 * @returns how many were looked at
 */
export async function refreshBookings(job: JobPayload<'refresh-bookings'>, fixedNow?: Date): Promise<number> {
  const { siteId } = job;
  authorise(systemActor(siteId, 'refresh-bookings'), 'booking.check', { siteId });
  let looked = 0;
  for (let more = true; more && looked < IN_ONE_JOB; ) {
    const now = fixedNow ?? new Date();
    const due = await inTransaction(siteId, (trx) => listStale(trx, siteId, now, PICKED_AT_ONCE));
    for (const bookingId of due) await refreshOne(siteId, bookingId, now);
    looked += due.length;
    more = due.length === PICKED_AT_ONCE;
  }
  if (looked >= IN_ONE_JOB) await inTransaction(siteId, (trx) => enqueue(trx, 'refresh-bookings', { siteId }));
  return looked;
}
