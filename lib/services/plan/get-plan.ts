import { inTransaction } from '@/db/client';
import { findPlan, findPlanByShortCode } from '@/db/queries/plan/plans';
import { authorise } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { readShortCode } from '@/lib/domain/plan/short-code';
import type { PlanView } from '@/lib/schemas/plan';
import { readPlannedSetup } from '../booking/read-booking-setup';
import type { ServiceContext } from '../context';
import { toPlanView } from './to-plan-view';

/** A plan in its newest version, or in the one that is named. */
export async function getPlan(
  { actor }: ServiceContext,
  input: { readonly id: string; readonly version?: number },
): Promise<PlanView> {
  return inTransaction(actor.siteId, async (trx) => {
    const plan = await findPlan(trx, actor.siteId, input.id, input.version);
    authorise(actor, 'plan.read', plan);
    return toPlanView(plan, await readPlannedSetup(trx, plan));
  });
}

/** The plan behind the short link of a sheet; the view says when a newer version exists. */
export async function getPlanByShortCode(
  { actor }: ServiceContext,
  input: { readonly code: string; readonly version?: number },
): Promise<PlanView> {
  const code = readShortCode(input.code);
  if (!code) throw new ServiceError('not-found');
  return inTransaction(actor.siteId, async (trx) => {
    const plan = await findPlanByShortCode(trx, actor.siteId, code, input.version);
    authorise(actor, 'plan.read', plan);
    return toPlanView(plan, await readPlannedSetup(trx, plan));
  });
}
