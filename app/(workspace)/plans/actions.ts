'use server';

import { revalidatePath } from 'next/cache';
import { runAction } from '@/lib/http/run-action';
import type { OutcomeForm } from '@/lib/schemas/outcome';
import { recordOutcome } from '@/lib/services/outcome/record-outcome';
import { movePlan } from '@/lib/services/plan/move-plan';
import { signOffPlan } from '@/lib/services/plan/sign-off-plan';

type Target = 'draft' | 'for use' | 'used';

export async function movePlanAction(id: string, expectedVersion: number, to: Target) {
  return runAction('move a plan', async (context) => {
    const { state } = await movePlan(context, { id, expectedVersion, to });
    revalidatePath(`/plans/${id}`);
    return { state };
  });
}

export async function signOffAction(
  id: string,
  expectedVersion: number,
  values: { decision: 'signed off' | 'sent back'; reason: string },
) {
  return runAction('sign off a plan', async (context) => {
    const { state } = await signOffPlan(context, { id, expectedVersion, ...values });
    revalidatePath(`/plans/${id}`);
    return { state };
  });
}

export async function recordOutcomeAction(planId: string, expectedVersion: number, id: string, form: OutcomeForm) {
  return runAction('record an outcome', async (context) => {
    const { wrap } = await recordOutcome(context, { ...form, planId, expectedVersion, id });
    revalidatePath(`/plans/${planId}`);
    return { wrap };
  });
}
