import { inTransaction } from '@/db/client';
import { findBooking } from '@/db/queries/booking/bookings';
import { listEntries } from '@/db/queries/booking-entry/booking-entries';
import { listResultChanges } from '@/db/queries/pre-check/check-results';
import { listSizeReadings } from '@/db/queries/size-reading/size-readings';
import { authorise } from '@/lib/domain/access';
import { QUANTITY_FACTS } from '@/lib/domain/size-reading/quantities';
import type { SizeReading } from '@/lib/domain/size-reading/size-reading';
import type { HistoryLine } from '@/lib/schemas/booking-entry';
import type { ServiceContext } from '../context';

const MOST = 200;

/** Readings that were written down together are one line; which sizes, never their values. */
function sizeLines(readings: readonly SizeReading[]): HistoryLine[] {
  const together = new Map<string, SizeReading[]>();
  for (const reading of readings) {
    const at = reading.recordedAt.toISOString();
    together.set(at, [...(together.get(at) ?? []), reading]);
  }
  return [...together].map(([at, of]) => ({
    id: `sizes-${at}`, at, kind: 'sizes' as const, sizes: of.map(({ quantity }) => QUANTITY_FACTS[quantity].label),
  }));
}

/** What was written on a booking and what became of it, newest first. */
export async function listHistory({ actor }: ServiceContext, input: { readonly bookingId: string }): Promise<HistoryLine[]> {
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const booking = await findBooking(trx, siteId, input.bookingId);
    authorise(actor, 'booking.read', booking);
    const entries = await listEntries(trx, siteId, booking.id, MOST);
    const results = await listResultChanges(trx, siteId, booking.id);
    const readings = await listSizeReadings(trx, siteId, booking.id);
    const lines: HistoryLine[] = [
      ...entries.map(({ id, kind, note, data, by, roles, at }) => ({
        id, at: at.toISOString(), kind, by, roles, data, ...(note === '' ? {} : { note }),
      })),
      ...results.map(({ result, at }) => ({ id: `result-${at.toISOString()}`, at: at.toISOString(), kind: 'result' as const, result })),
      ...sizeLines(readings),
    ];
    return lines.sort((a, b) => b.at.localeCompare(a.at)).slice(0, MOST);
  });
}
