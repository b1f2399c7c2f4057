import { mayAttempt } from '@/lib/domain/access';
import { getBooking } from '../booking/get-booking';
import { listHistory } from '../booking-entry/list-history';
import type { ServiceContext } from '../context';
import { getOpenMove } from '../move-proposal/list-moves';
import { suggestPlaces } from '../move-proposal/suggest-places';
import { getSizeRecord } from '../size-reading/get-size-record';
import { getPreCheck } from './get-pre-check';

/** Everything the page of one booking shows to this person. */
export async function getBookingPage(context: ServiceContext, { bookingId }: { readonly bookingId: string }) {
  const { actor } = context;
  const [booking, record, check, history] = await Promise.all([
    getBooking(context, { id: bookingId }),
    getSizeRecord(context, { bookingId }),
    getPreCheck(context, { bookingId }),
    listHistory(context, { bookingId }),
  ]);
  const mayPropose = mayAttempt(actor, 'booking.propose');
  return {
    booking, record, check, history,
    move: await getOpenMove(context, { bookingId }),
    places: mayPropose ? await suggestPlaces(context, { bookingId }) : null,
    may: {
      plan: mayAttempt(actor, 'plan.edit'),
      record: mayAttempt(actor, 'size-reading.record'),
      note: mayAttempt(actor, 'booking.note'),
      escalate: mayAttempt(actor, 'booking.escalate'),
      decide: mayAttempt(actor, 'booking.decide'),
    },
  };
}
