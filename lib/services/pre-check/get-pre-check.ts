import { inTransaction } from '@/db/client';
import { findBooking } from '@/db/queries/booking/bookings';
import { findNewestCheck } from '@/db/queries/pre-check/check-results';
import { authorise } from '@/lib/domain/access';
import type { PreCheckView } from '@/lib/schemas/pre-check';
import type { ServiceContext } from '../context';

/** The newest check of a booking, with whether it still stands; null before the first. */
export async function getPreCheck({ actor }: ServiceContext, input: { readonly bookingId: string }): Promise<PreCheckView | null> {
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const booking = await findBooking(trx, siteId, input.bookingId);
    authorise(actor, 'booking.read', booking);
    const check = await findNewestCheck(trx, siteId, booking.id);
    if (!check) return null;
    const { schemaVersion: _version, ...preCheck } = check.document;
    return { ...preCheck, number: check.number, checkedAt: check.checkedAt.toISOString(), stale: booking.state.stale ?? true };
  });
}
