import { handleRoute } from '@/lib/http/handle-route';
import { writeLimit } from '@/lib/http/rate-limit';
import { requestHandOutBody } from '@/lib/schemas/demonstration';
import { idParams } from '@/lib/schemas/fields/ids';
import { requestHandOut } from '@/lib/services/demonstration/request-hand-out';

/** Asks for all scenes as PDF, which the worker makes. */
export const POST = handleRoute({ params: idParams, body: requestHandOutBody }, async ({ actor, context, params, body }) => {
  writeLimit.count(actor);
  return requestHandOut(context, { demonstrationId: params.id, ...body });
});
