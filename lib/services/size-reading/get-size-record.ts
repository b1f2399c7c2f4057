import { inTransaction } from '@/db/client';
import { findBooking } from '@/db/queries/booking/bookings';
import { findScanner } from '@/db/queries/scanner/scanners';
import { findPolicy } from '@/db/queries/site-policy/policies';
import { listSizeReadings } from '@/db/queries/size-reading/size-readings';
import { authorise } from '@/lib/domain/access';
import type { SizeRecordView } from '@/lib/schemas/size-reading';
import { nowOf, type ServiceContext } from '../context';
import { effectivePolicy } from '../site-policy/effective-policy';
import { toSizeRecord } from './to-size-record';

/** The sizes of a booking's patient: every reading, and what they come to. */
export async function getSizeRecord(context: ServiceContext, input: { readonly bookingId: string }): Promise<SizeRecordView> {
  const { actor } = context;
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const booking = await findBooking(trx, siteId, input.bookingId);
    authorise(actor, 'size-reading.read', booking);
    const scanner = await findScanner(trx, siteId, booking.scannerId);
    authorise(actor, 'size-reading.read', scanner);
    return toSizeRecord({
      readings: await listSizeReadings(trx, siteId, booking.id),
      region: booking.region,
      tissueReachMm: scanner.document.scanner.tissueReachMm,
      policy: effectivePolicy(await findPolicy(trx, siteId)).policy,
      now: nowOf(context),
    });
  });
}
