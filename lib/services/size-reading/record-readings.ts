import { inTransaction } from '@/db/client';
import { findBooking } from '@/db/queries/booking/bookings';
import { insertSizeReadings } from '@/db/queries/size-reading/size-readings';
import { authorise } from '@/lib/domain/access';
import { invalidField } from '@/lib/domain/errors';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordReadingsInput, type RecordReadings, type SizeRecordView } from '@/lib/schemas/size-reading';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { refreshBookingState } from '../booking/refresh-booking-state';
import { nowOf, type ServiceContext } from '../context';

/** A day that has not come anywhere on earth yet. */
function isInFuture(takenOn: string, now: Date): boolean {
  const latestToday = new Date(now.getTime() + 14 * 3_600_000).toISOString().slice(0, 10);
  return takenOn > latestToday;
}

function refuseFuture({ readings }: RecordReadings, now: Date): void {
  readings.forEach(({ takenOn }, index) => {
    if (isInFuture(takenOn, now)) throw invalidField(`readings.${index}.takenOn`, `${takenOn} given; allowed: a day up to today`);
  });
}

/** Adds readings to a booking; earlier ones stay. What lists show of the booking is worked out again at once. */
export async function recordReadings(context: ServiceContext, input: unknown): Promise<SizeRecordView> {
  const { actor } = context;
  const parsed = parseInput(recordReadingsInput, input);
  const now = nowOf(context);
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const booking = await findBooking(trx, siteId, parsed.bookingId);
    authorise(actor, 'size-reading.record', booking);
    refuseFuture(parsed, now);
    await insertSizeReadings(trx, siteId, booking.id, parsed.readings, { by: authorOf(actor), at: now });
    await recordAudit(trx, context, {
      action: 'size-reading.record',
      subjectType: 'booking',
      subjectId: booking.id,
      fields: parsed.readings.map(({ quantity }) => quantity),
    });
    const { sizeRecord } = await refreshBookingState(trx, { siteId, bookingId: booking.id, now });
    return sizeRecord;
  });
}
