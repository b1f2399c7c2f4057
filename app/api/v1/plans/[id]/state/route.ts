import { handleRoute } from '@/lib/http/handle-route';
import { idParams } from '@/lib/schemas/fields/ids';
import { movePlanBody } from '@/lib/schemas/plan';
import { movePlan } from '@/lib/services/plan/move-plan';

export const POST = handleRoute({ params: idParams, body: movePlanBody }, async ({ context, params, body }) =>
  movePlan(context, { ...params, ...body }),
);
