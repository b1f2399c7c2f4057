import { inTransaction } from '@/db/client';
import { listOutcomes as readOutcomes } from '@/db/queries/outcome/outcomes';
import { findPlan } from '@/db/queries/plan/plans';
import { authorise } from '@/lib/domain/access';
import type { OutcomeView } from '@/lib/schemas/outcome';
import type { ServiceContext } from '../context';
import { toOutcomeView } from './to-outcome-view';

/** What came of a plan, newest first: a correction is another outcome, the earlier one stays. */
export async function listOutcomes(
  { actor }: ServiceContext,
  input: { readonly planId: string },
): Promise<{ readonly outcomes: readonly OutcomeView[] }> {
  return inTransaction(actor.siteId, async (trx) => {
    const plan = await findPlan(trx, actor.siteId, input.planId);
    authorise(actor, 'outcome.read', plan);
    return { outcomes: (await readOutcomes(trx, actor.siteId, plan.id)).map(toOutcomeView) };
  });
}
