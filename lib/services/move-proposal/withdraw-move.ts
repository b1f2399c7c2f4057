import { inTransaction } from '@/db/client';
import { insertEntry } from '@/db/queries/booking-entry/booking-entries';
import { findOpenMove, settleMove } from '@/db/queries/move-proposal/move-proposals';
import { authorise } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { entryPlace } from './to-move-view';

/** Takes a proposed move back; what is booked stays. */
export async function withdrawMove(context: ServiceContext, input: { readonly bookingId: string }): Promise<void> {
  const { actor } = context;
  const { siteId } = actor;
  const now = nowOf(context);
  await inTransaction(siteId, async (trx) => {
    const open = await findOpenMove(trx, siteId, input.bookingId);
    authorise(actor, 'booking.settle', open);
    if (!(await settleMove(trx, siteId, open.id, 'withdrawn', now))) throw new ServiceError('conflict');
    await insertEntry(trx, actor, { bookingId: open.bookingId, kind: 'move-withdrawn', now, data: { from: entryPlace(open.before), to: entryPlace(open.proposed) } });
    await recordAudit(trx, context, { action: 'booking.settle', subjectType: 'move', subjectId: open.id, fields: ['status'] });
  });
}
