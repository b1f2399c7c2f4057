import { handleRoute } from '@/lib/http/handle-route';
import { idParams } from '@/lib/schemas/fields/ids';
import { openBench } from '@/lib/services/booking/open-bench';

export const GET = handleRoute({ params: idParams }, async ({ context, params }) =>
  openBench(context, { bookingId: params.id }),
);
