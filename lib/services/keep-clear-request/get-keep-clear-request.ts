import { inTransaction } from '@/db/client';
import { findBooking } from '@/db/queries/booking/bookings';
import { findKeepClearRequest } from '@/db/queries/keep-clear-request/keep-clear-requests';
import { authorise } from '@/lib/domain/access';
import type { KeepClearRequestView } from '@/lib/schemas/keep-clear-request';
import type { ServiceContext } from '../context';
import { toKeepClearRequestView } from './to-keep-clear-request-view';

/** What was asked for a booking, as it was asked; null when nobody has. */
export async function getKeepClearRequest(
  { actor }: ServiceContext,
  input: { readonly bookingId: string },
): Promise<KeepClearRequestView | null> {
  return inTransaction(actor.siteId, async (trx) => {
    const booking = await findBooking(trx, actor.siteId, input.bookingId);
    authorise(actor, 'booking.read', booking);
    const request = await findKeepClearRequest(trx, actor.siteId, booking.id);
    return request && toKeepClearRequestView(request, undefined);
  });
}
