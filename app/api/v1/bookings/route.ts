import { handleRoute } from '@/lib/http/handle-route';
import { writeLimit } from '@/lib/http/rate-limit';
import { readJson } from '@/lib/http/read-json';
import { createBookingInput, listBookingsQuery } from '@/lib/schemas/booking';
import { parseInput } from '@/lib/schemas/parse-input';
import { createBooking } from '@/lib/services/booking/create-booking';
import { listBookings } from '@/lib/services/booking/list-bookings';
import { importBundle } from '@/lib/services/import/import-bundle';

/** A bundle brings much that is dropped; a day's bookings of a large site fit in. */
const MAX_BUNDLE_BYTES = 20_000_000;
const isFhir = (headers: Headers) => /^application\/fhir\+json\b/i.test(headers.get('content-type') ?? '');

export const GET = handleRoute({ query: listBookingsQuery }, async ({ context, query }) => listBookings(context, query));

/** One booking as JSON, or many as a FHIR R4 bundle. */
export const POST = handleRoute({}, async ({ actor, context, request }) => {
  writeLimit.count(actor);
  const headers = { 'cache-control': 'no-store' };
  if (isFhir(request.headers)) return Response.json(await importBundle(context, await readJson(request, MAX_BUNDLE_BYTES)), { headers });
  const body = parseInput(createBookingInput, await readJson(request));
  return Response.json(await createBooking(context, body), { status: 201, headers });
});
