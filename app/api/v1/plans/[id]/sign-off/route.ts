import { handleRoute } from '@/lib/http/handle-route';
import { writeLimit } from '@/lib/http/rate-limit';
import { idParams } from '@/lib/schemas/fields/ids';
import { signOffBody } from '@/lib/schemas/plan';
import { signOffPlan } from '@/lib/services/plan/sign-off-plan';

export const POST = handleRoute({ params: idParams, body: signOffBody }, async ({ actor, context, params, body }) => {
  writeLimit.count(actor);
  return signOffPlan(context, { ...params, ...body });
});
