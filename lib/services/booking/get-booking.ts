import { inTransaction } from '@/db/client';
import { findBooking } from '@/db/queries/booking/bookings';
import { authorise } from '@/lib/domain/access';
import type { BookingListItem } from '@/lib/schemas/booking';
import type { ServiceContext } from '../context';
import { toBookingListItem } from './to-booking-view';

export async function getBooking({ actor }: ServiceContext, input: { readonly id: string }): Promise<BookingListItem> {
  const booking = await inTransaction(actor.siteId, (trx) => findBooking(trx, actor.siteId, input.id));
  authorise(actor, 'booking.read', booking);
  return toBookingListItem(booking);
}
