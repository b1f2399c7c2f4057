import { handleRoute } from '@/lib/http/handle-route';
import { writeLimit } from '@/lib/http/rate-limit';
import { idParams } from '@/lib/schemas/fields/ids';
import { recordOutcomeBody } from '@/lib/schemas/outcome';
import { listOutcomes } from '@/lib/services/outcome/list-outcomes';
import { recordOutcome } from '@/lib/services/outcome/record-outcome';

export const GET = handleRoute({ params: idParams }, async ({ context, params }) => listOutcomes(context, { planId: params.id }));

export const POST = handleRoute({ params: idParams, body: recordOutcomeBody }, async ({ actor, context, params, body }) => {
  writeLimit.count(actor);
  return recordOutcome(context, { planId: params.id, ...body });
});
