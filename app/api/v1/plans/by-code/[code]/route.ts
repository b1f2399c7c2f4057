import { handleRoute } from '@/lib/http/handle-route';
import { codeParams, planQuery } from '@/lib/schemas/plan';
import { getPlanByShortCode } from '@/lib/services/plan/get-plan';

/** The plan behind the short link of a sheet. */
export const GET = handleRoute({ params: codeParams, query: planQuery }, async ({ context, params, query }) =>
  getPlanByShortCode(context, { ...params, ...query }),
);
