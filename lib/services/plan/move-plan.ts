import { inTransaction, type SiteTransaction } from '@/db/client';
import { findPlan, lockPlan, setPlanState } from '@/db/queries/plan/plans';
import { findPolicy } from '@/db/queries/site-policy/policies';
import { authorise, type Action } from '@/lib/domain/access';
import { ServiceError, staleVersion } from '@/lib/domain/errors';
import type { PlanRecord } from '@/lib/domain/plan/plan';
import type { PlanState } from '@/lib/domain/plan/states';
import { policyForExam } from '@/lib/domain/keep-clear-request/document';
import { needsSignOff, refusalToMove } from '@/lib/domain/plan/transitions';
import { parseInput } from '@/lib/schemas/parse-input';
import { movePlanInput, type PlanView } from '@/lib/schemas/plan';
import { recordAudit } from '../audit/record-audit';
import { refreshBookingState } from '../booking/refresh-booking-state';
import { readPlannedSetup } from '../booking/read-booking-setup';
import { nowOf, type ServiceContext } from '../context';
import { effectivePolicy } from '../site-policy/effective-policy';
import { tellAboutPlan } from './tell-about-plan';
import { toPlanView } from './to-plan-view';

const ACTIONS: Readonly<Record<'draft' | 'for use' | 'used', Action>> = {
  draft: 'plan.withdraw',
  'for use': 'plan.release',
  used: 'plan.use',
};

/** Locks a plan, authorises on its own row and makes sure that it is the version that was read. */
export async function lockExpectedPlan(
  trx: SiteTransaction,
  { actor }: ServiceContext,
  expected: { readonly id: string; readonly expectedVersion: number; readonly action: Action },
): Promise<PlanRecord> {
  const head = await lockPlan(trx, actor.siteId, expected.id);
  authorise(actor, expected.action, head);
  if (head.currentVersion !== expected.expectedVersion) throw staleVersion(head.currentVersion);
  const plan = await findPlan(trx, actor.siteId, head.id);
  if (!plan) throw new ServiceError('not-found');
  return plan;
}

/**
 * Moves a locked plan, or says why not. Whether a sign-off is needed is judged by today's policy.
 * @returns whether it is
 */
export async function moveLockedPlan(trx: SiteTransaction, context: ServiceContext, plan: PlanRecord, to: PlanState): Promise<boolean> {
  const { siteId } = context.actor;
  const today = effectivePolicy(await findPolicy(trx, siteId));
  const policy = policyForExam(today.policy, plan.toleratedFoldOutsidePct);
  const refusal = refusalToMove({ state: plan.state, assessments: plan.result.assessments, policy }, to);
  if (refusal) throw new ServiceError('conflict', { message: refusal, details: { state: plan.state } });
  await setPlanState(trx, siteId, plan.id, to);
  if (plan.bookingId !== null) {
    await refreshBookingState(trx, { siteId, bookingId: plan.bookingId, now: nowOf(context) });
  }
  return needsSignOff(plan.result.assessments, policy);
}

export async function viewMovedPlan(trx: SiteTransaction, siteId: string, id: string): Promise<PlanView> {
  const plan = await findPlan(trx, siteId, id);
  if (!plan) throw new ServiceError('not-found');
  return toPlanView(plan, await readPlannedSetup(trx, plan));
}

/** Puts a plan for use, takes it back to draft, or marks it as used. */
export async function movePlan(context: ServiceContext, input: unknown): Promise<PlanView> {
  const { id, expectedVersion, to } = parseInput(movePlanInput, input);
  const action = ACTIONS[to];
  return inTransaction(context.actor.siteId, async (trx) => {
    const plan = await lockExpectedPlan(trx, context, { id, expectedVersion, action });
    const asksSignOff = await moveLockedPlan(trx, context, plan, to);
    await recordAudit(trx, context, { action, subjectType: 'plan', subjectId: id, fields: ['state'] });
    if (to === 'for use') {
      if (asksSignOff) await recordAudit(trx, context, { action: 'plan.ask-sign-off', subjectType: 'plan', subjectId: id });
      await tellAboutPlan(trx, context.actor, plan, asksSignOff ? 'sign-off-asked' : 'plan-for-use');
    }
    return viewMovedPlan(trx, context.actor.siteId, id);
  });
}
