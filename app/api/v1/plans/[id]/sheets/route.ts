import { handleRoute } from '@/lib/http/handle-route';
import { writeLimit } from '@/lib/http/rate-limit';
import { idParams } from '@/lib/schemas/fields/ids';
import { requestSheetBody } from '@/lib/schemas/plan-sheet';
import { requestSheet } from '@/lib/services/plan-sheet/request-sheet';

/** Asks for a plan sheet as PDF, which the worker makes. */
export const POST = handleRoute({ params: idParams, body: requestSheetBody }, async ({ actor, context, params, body }) => {
  writeLimit.count(actor);
  return requestSheet(context, { planId: params.id, ...body });
});
