import { handleRoute } from '@/lib/http/handle-route';
import { idParams } from '@/lib/schemas/fields/ids';
import { getNewestVersion } from '@/lib/services/plan/get-newest-version';

export const GET = handleRoute({ params: idParams }, async ({ context, params }) =>
  getNewestVersion(context, { bookingId: params.id }),
);
