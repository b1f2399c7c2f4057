import { handleRoute } from '@/lib/http/handle-route';
import { idParams } from '@/lib/schemas/fields/ids';
import { signOffBody } from '@/lib/schemas/plan';
import { signOffPlan } from '@/lib/services/plan/sign-off-plan';

export const POST = handleRoute({ params: idParams, body: signOffBody }, async ({ context, params, body }) =>
  signOffPlan(context, { ...params, ...body }),
);
