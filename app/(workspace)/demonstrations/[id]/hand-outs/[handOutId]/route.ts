import { handleRoute } from '@/lib/http/handle-route';
import { handOutParams } from '@/lib/schemas/demonstration';
import { getHandOut } from '@/lib/services/demonstration/get-hand-out';

export const GET = handleRoute({ params: handOutParams }, async ({ context, params }) =>
  getHandOut(context, { demonstrationId: params.id, handOutId: params.handOutId }),
);
