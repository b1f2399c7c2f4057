import { inTransaction } from '@/db/client';
import { authorise } from '@/lib/domain/access';
import type { Suggestions } from '@/lib/schemas/move-proposal';
import { nowOf, type ServiceContext } from '../context';
import { readQuestion } from '../pre-check/read-question';
import { findPlaces } from './find-places';

/** Where a booking could go instead: every scanner with how it stands and its room. */
export async function suggestPlaces(context: ServiceContext, input: { readonly bookingId: string }): Promise<Suggestions> {
  const { actor } = context;
  return inTransaction(actor.siteId, async (trx) => {
    const setup = await readQuestion(trx, actor.siteId, input.bookingId);
    authorise(actor, 'booking.propose', setup?.booking);
    return findPlaces(trx, actor.siteId, setup!, nowOf(context));
  });
}
