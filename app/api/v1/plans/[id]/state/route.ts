import { handleRoute } from '@/lib/http/handle-route';
import { writeLimit } from '@/lib/http/rate-limit';
import { idParams } from '@/lib/schemas/fields/ids';
import { movePlanBody } from '@/lib/schemas/plan';
import { movePlan } from '@/lib/services/plan/move-plan';

export const POST = handleRoute({ params: idParams, body: movePlanBody }, async ({ actor, context, params, body }) => {
  writeLimit.count(actor);
  return movePlan(context, { ...params, ...body });
});
