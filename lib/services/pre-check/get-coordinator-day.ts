import { inTransaction } from '@/db/client';
import { countResults, listEscalated } from '@/db/queries/booking/booking-table';
import { listMoves } from '@/db/queries/move-proposal/move-proposals';
import { countFailedMail } from '@/db/queries/outbox';
import { authorise } from '@/lib/domain/access';
import { dayOf } from '@/lib/domain/site/local-day';
import type { BookingListItem } from '@/lib/schemas/booking';
import { toBookingListItem } from '../booking/to-booking-view';
import { nowOf, type ServiceContext } from '../context';

const DAYS = 14;
const MOST = 20;

export interface CoordinatorDay {
  readonly days: number;
  readonly counts: Readonly<Record<string, number>>;
  readonly openMoves: number;
  /** Mails that were given up. */
  readonly undelivered: number;
  readonly escalated: readonly BookingListItem[];
}

/** What waits for whoever fixes bookings: the coming fortnight by result, moves to make, and what a lead was asked. */
export async function getCoordinatorDay(context: ServiceContext): Promise<CoordinatorDay> {
  const { actor } = context;
  authorise(actor, 'booking.propose');
  const { from } = dayOf(nowOf(context));
  const before = new Date(from.getFullYear(), from.getMonth(), from.getDate() + DAYS);
  return inTransaction(actor.siteId, async (trx) => ({
    days: DAYS,
    counts: await countResults(trx, actor.siteId, { from, before }),
    openMoves: (await listMoves(trx, actor.siteId, 'open', 2000)).length,
    undelivered: await countFailedMail(trx, actor.siteId),
    escalated: (await listEscalated(trx, actor.siteId, from, MOST)).map(toBookingListItem),
  }));
}
