import type { SiteTransaction } from '@/db/client';
import { insertEntry } from '@/db/queries/booking-entry/booking-entries';
import { settleAgreedMoves, type Place } from '@/db/queries/move-proposal/move-proposals';
import type { EntryPlace } from '@/lib/domain/booking/entry';
import { nowOf, type ServiceContext } from '../context';
import { bookingsChanged } from '../pre-check/mark-changed';

export type NamedPlace = Place & { readonly scannerName: string };

export const placeOf = (place: NamedPlace): EntryPlace => ({ scanner: place.scannerName, at: place.scheduledAt.toISOString(), slotMinutes: place.slotMinutes });

/** One booking of which the booking system says something else than before. */
export interface BookedChange {
  readonly bookingId: string;
  readonly from: NamedPlace;
  readonly to: NamedPlace;
}

/**
 * What follows when an import or the API has changed what is booked, in its transaction: the line in the history, the
 * closing of a proposed move that is now agreed, and a new check. Call it after the rows are written.
 */
export async function bookedChanged(trx: SiteTransaction, context: ServiceContext, changes: readonly BookedChange[]): Promise<void> {
  const { actor } = context;
  const now = nowOf(context);
  const ids = changes.map(({ bookingId }) => bookingId);
  for (const { bookingId, from, to } of changes) {
    await insertEntry(trx, actor, { bookingId, kind: 'booked', now, data: { from: placeOf(from), to: placeOf(to) } });
  }
  const agreed = new Set(await settleAgreedMoves(trx, actor.siteId, ids, now));
  for (const { bookingId, from, to } of changes.filter((change) => agreed.has(change.bookingId))) {
    await insertEntry(trx, actor, { bookingId, kind: 'move-agreed', now, data: { from: placeOf(from), to: placeOf(to) } });
  }
  await bookingsChanged(trx, actor.siteId, ids, now);
}
