import { handleRoute } from '@/lib/http/handle-route';
import { writeLimit } from '@/lib/http/rate-limit';
import { createBookingInput, listBookingsQuery } from '@/lib/schemas/booking';
import { createBooking } from '@/lib/services/booking/create-booking';
import { listBookings } from '@/lib/services/booking/list-bookings';

export const GET = handleRoute({ query: listBookingsQuery }, async ({ context, query }) => listBookings(context, query));

export const POST = handleRoute({ body: createBookingInput }, async ({ actor, context, body }) => {
  writeLimit.count(actor);
  return Response.json(await createBooking(context, body), { status: 201, headers: { 'cache-control': 'no-store' } });
});
