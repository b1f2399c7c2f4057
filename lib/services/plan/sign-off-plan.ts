import { inTransaction } from '@/db/client';
import { insertSignOff } from '@/db/queries/plan/plans';
import { invalidField } from '@/lib/domain/errors';
import { parseInput } from '@/lib/schemas/parse-input';
import { type PlanView, signOffInput } from '@/lib/schemas/plan';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { nowOf, type ServiceContext } from '../context';
import { lockExpectedPlan, moveLockedPlan, viewMovedPlan } from './move-plan';
import { tellAboutPlan } from './tell-about-plan';

/** A radiologist's decision on exactly the version that was read: signed off, or sent back to draft with a reason. */
export async function signOffPlan(context: ServiceContext, input: unknown): Promise<PlanView> {
  const { id, expectedVersion, decision, reason } = parseInput(signOffInput, input);
  const signedOff = decision === 'signed off';
  const action = signedOff ? 'plan.sign-off' : 'plan.send-back';
  const { siteId } = context.actor;
  return inTransaction(siteId, async (trx) => {
    const plan = await lockExpectedPlan(trx, context, { id, expectedVersion, action });
    if (!signedOff && reason === '') throw invalidField('reason', 'needed when a plan is sent back: what should change');
    await moveLockedPlan(trx, context, plan, signedOff ? 'signed off' : 'draft');
    await insertSignOff(trx, {
      siteId, planId: id, planVersion: plan.version, decision, reason, signedBy: authorOf(context.actor), now: nowOf(context),
    });
    await recordAudit(trx, context, { action, subjectType: 'sign-off', subjectId: id, fields: ['decision'] });
    await tellAboutPlan(trx, context.actor, plan, signedOff ? 'plan-for-use' : 'plan-sent-back');
    return viewMovedPlan(trx, siteId, id);
  });
}
