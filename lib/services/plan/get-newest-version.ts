import { inTransaction } from '@/db/client';
import { findBooking } from '@/db/queries/booking/bookings';
import { findNewestVersion } from '@/db/queries/plan/plans';
import { authorise } from '@/lib/domain/access';
import type { NewestVersionView } from '@/lib/schemas/plan';
import type { ServiceContext } from '../context';

/** Which version of a booking's plan is the newest: an open bench asks, so that two people learn of each other before they save. */
export async function getNewestVersion({ actor }: ServiceContext, input: { readonly bookingId: string }): Promise<NewestVersionView> {
  return inTransaction(actor.siteId, async (trx) => {
    authorise(actor, 'plan.read', await findBooking(trx, actor.siteId, input.bookingId));
    const newest = await findNewestVersion(trx, actor.siteId, input.bookingId);
    return { newest: newest && { ...newest, savedAt: newest.savedAt.toISOString() } };
  });
}
