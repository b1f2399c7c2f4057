import type { MoveRecord, Place } from '@/db/queries/move-proposal/move-proposals';
import type { EntryPlace } from '@/lib/domain/booking/entry';
import type { MoveView, PlaceView } from '@/lib/schemas/move-proposal';

type NamedPlace = Place & { readonly scannerName: string };

const placeView = (place: NamedPlace): PlaceView => ({
  scannerId: place.scannerId, scannerName: place.scannerName, scheduledAt: place.scheduledAt.toISOString(), slotMinutes: place.slotMinutes,
});

export const samePlace = (a: Place, b: Place): boolean =>
  a.scannerId === b.scannerId && a.scheduledAt.getTime() === b.scheduledAt.getTime() && a.slotMinutes === b.slotMinutes;

export const entryPlace = (place: NamedPlace): EntryPlace => ({
  scanner: place.scannerName, at: place.scheduledAt.toISOString(), slotMinutes: place.slotMinutes,
});

export function toMoveView(move: MoveRecord): MoveView {
  return {
    id: move.id,
    bookingId: move.bookingId,
    accession: move.accession,
    protocolName: move.protocolName,
    status: move.status,
    proposed: placeView(move.proposed),
    before: placeView(move.before),
    booked: placeView(move.booked),
    differs: move.status === 'open' && !samePlace(move.before, move.booked),
    reason: move.reason,
    proposedBy: move.proposedBy,
    proposedAt: move.proposedAt.toISOString(),
    ...(move.settledAt ? { settledAt: move.settledAt.toISOString() } : {}),
  };
}
