import { handleRoute } from '@/lib/http/handle-route';
import { writeLimit } from '@/lib/http/rate-limit';
import { idParams } from '@/lib/schemas/fields/ids';
import { addReadingsBody } from '@/lib/schemas/size-reading';
import { getSizeRecord } from '@/lib/services/size-reading/get-size-record';
import { recordReadings } from '@/lib/services/size-reading/record-readings';

export const GET = handleRoute({ params: idParams }, async ({ context, params }) =>
  getSizeRecord(context, { bookingId: params.id }),
);

export const POST = handleRoute({ params: idParams, body: addReadingsBody }, async ({ actor, context, params, body }) => {
  writeLimit.count(actor);
  return recordReadings(context, { bookingId: params.id, readings: body.readings });
});
