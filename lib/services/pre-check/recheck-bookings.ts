import { inTransaction } from '@/db/client';
import { findBooking } from '@/db/queries/booking/bookings';
import { authorise } from '@/lib/domain/access';
import { manyBookingsInput } from '@/lib/schemas/pre-check';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { bookingsChanged } from './mark-changed';

/** Asks for a new check of these bookings. @returns how many wait for it */
export async function recheckBookings(context: ServiceContext, input: unknown): Promise<{ readonly waiting: number }> {
  const { actor } = context;
  const { siteId } = actor;
  authorise(actor, 'booking.check');
  const bookingIds = [...new Set(parseInput(manyBookingsInput, input).bookingIds)];
  return inTransaction(siteId, async (trx) => {
    // Row-level security hides another site's; one that is not there at all is refused like it.
    for (const id of bookingIds) authorise(actor, 'booking.check', await findBooking(trx, siteId, id));
    await bookingsChanged(trx, siteId, bookingIds, nowOf(context));
    await recordAudit(trx, context, ...bookingIds.map((subjectId) => ({ action: 'booking.check' as const, subjectType: 'booking' as const, subjectId, fields: [] })));
    return { waiting: bookingIds.length };
  });
}
