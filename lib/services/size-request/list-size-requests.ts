import { inTransaction } from '@/db/client';
import { findBooking } from '@/db/queries/booking/bookings';
import { listSizeRequests as readRequests, type ListedRequest } from '@/db/queries/size-request/size-requests';
import { authorise } from '@/lib/domain/access';
import type { SizeRequestView } from '@/lib/schemas/size-request';
import { nowOf, type ServiceContext } from '../context';

function toView(request: ListedRequest, now: Date): SizeRequestView {
  const mail = request.mailStatus as 'queued' | 'sent' | 'failed' | null;
  return {
    id: request.id,
    status: request.status === 'open' && request.expiresAt <= now ? 'expired' : request.status,
    askedAt: request.askedAt.toISOString(),
    expiresAt: request.expiresAt.toISOString(),
    sentCount: request.sentCount,
    ...(request.settledAt ? { settledAt: request.settledAt.toISOString() } : {}),
    ...(request.lastSentAt ? { lastSentAt: request.lastSentAt.toISOString() } : {}),
    ...(request.addressMasked === '' ? {} : { addressMasked: request.addressMasked }),
    ...(mail ? { mail: { status: mail, ...(request.mailError ? { problem: request.mailError } : {}) } } : {}),
  };
}

/** A booking's size requests, newest first. */
export async function listSizeRequests(context: ServiceContext, input: { readonly bookingId: string }): Promise<SizeRequestView[]> {
  const { actor } = context;
  return inTransaction(actor.siteId, async (trx) => {
    const booking = await findBooking(trx, actor.siteId, input.bookingId);
    authorise(actor, 'size-request.read', booking);
    return (await readRequests(trx, actor.siteId, booking.id)).map((request) => toView(request, nowOf(context)));
  });
}
