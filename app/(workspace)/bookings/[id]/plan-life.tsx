import { KeepClearRequestPanel } from '@/components/keep-clear-request/request-panel';
import { OutcomeSection } from '@/components/outcome/outcome-section';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import type { BookingListItem } from '@/lib/schemas/booking';
import { getKeepClearRequest } from '@/lib/services/keep-clear-request/get-keep-clear-request';
import { listOutcomes } from '@/lib/services/outcome/list-outcomes';
import { getPlan } from '@/lib/services/plan/get-plan';
import { askKeepClear } from '../actions';

/** Before and after the plan: the area a radiologist asks for, and what came of it. */
export async function PlanLife({ booking }: { booking: Pick<BookingListItem, 'id' | 'region' | 'planId'> }) {
  const { id, region, planId } = booking;
  const { requested, mayAsk, plan, outcomes } = await loadPage(async (context) => ({
    requested: await getKeepClearRequest(context, { bookingId: id }),
    mayAsk: mayAttempt(context.actor, 'keep-clear.request'),
    plan: planId ? await getPlan(context, { id: planId }) : null,
    outcomes: planId ? (await listOutcomes(context, { planId })).outcomes : [],
  }));
  return (
    <>
      <KeepClearRequestPanel region={region} requested={requested} ask={mayAsk ? askKeepClear.bind(null, id) : undefined} />
      {plan && <OutcomeSection plan={plan} outcomes={outcomes} />}
    </>
  );
}
