import { handleRoute } from '@/lib/http/handle-route';
import { writeLimit } from '@/lib/http/rate-limit';
import { idParams } from '@/lib/schemas/fields/ids';
import { changeBookedBody } from '@/lib/schemas/move-proposal';
import { changeBooked } from '@/lib/services/booking/change-booked';
import { getBooking } from '@/lib/services/booking/get-booking';

export const GET = handleRoute({ params: idParams }, async ({ context, params }) => getBooking(context, params));

/** What the booking system says now. */
export const PUT = handleRoute({ params: idParams, body: changeBookedBody }, async ({ actor, context, params, body }) => {
  writeLimit.count(actor);
  return changeBooked(context, { ...params, body });
});
