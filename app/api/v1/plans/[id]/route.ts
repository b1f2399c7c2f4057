import * as z from 'zod';
import { handleRoute } from '@/lib/http/handle-route';
import { writeLimit } from '@/lib/http/rate-limit';
import { idParams } from '@/lib/schemas/fields/ids';
import { planQuery } from '@/lib/schemas/plan';
import { getPlan } from '@/lib/services/plan/get-plan';
import { savePlan } from '@/lib/services/plan/save-plan';

export const GET = handleRoute({ params: idParams, query: planQuery }, async ({ context, params, query }) =>
  getPlan(context, { ...params, ...query }),
);

/** Saves a whole plan as its next version; the header Idempotency-Key makes a repeated send harmless. */
export const PUT = handleRoute({ params: idParams, body: z.unknown() }, async ({ actor, context, params, body, request }) => {
  writeLimit.count(actor);
  return savePlan(context, { id: params.id, idempotencyKey: request.headers.get('idempotency-key') ?? undefined, body });
});
