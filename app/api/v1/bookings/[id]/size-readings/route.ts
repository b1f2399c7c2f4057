import { handleRoute } from '@/lib/http/handle-route';
import { idParams } from '@/lib/schemas/fields/ids';
import { addReadingsBody } from '@/lib/schemas/size-reading';
import { getSizeRecord } from '@/lib/services/size-reading/get-size-record';
import { recordReadings } from '@/lib/services/size-reading/record-readings';

export const GET = handleRoute({ params: idParams }, async ({ context, params }) =>
  getSizeRecord(context, { bookingId: params.id }),
);

export const POST = handleRoute({ params: idParams, body: addReadingsBody }, async ({ context, params, body }) =>
  recordReadings(context, { bookingId: params.id, readings: body.readings }),
);
