import type { SiteTransaction } from '@/db/client';
import { writeBookingState } from '@/db/queries/booking/bookings';
import type { BookingState } from '@/lib/domain/booking/booking';
import { ServiceError } from '@/lib/domain/errors';
import { assessAsBooked, stateOfAssessments } from '@/lib/domain/booking/assess-as-booked';
import { bookingsChanged } from '../pre-check/mark-changed';
import { readBookingSetup, type BookingSetup } from './read-booking-setup';

/** A plan says what will be scanned; without one it is the protocol as booked, once the sizes are known. */
function stateOf({ plan, protocol, scanner, policy, sizeRecord, request }: BookingSetup): BookingState {
  if (!plan && !sizeRecord.patient) return {};
  const assessments = plan
    ? plan.result.assessments
    : assessAsBooked({
        patient: sizeRecord.patient!,
        protocol: request?.document ?? protocol.document,
        sequences: protocol.sequences,
        scanner: scanner.document.scanner,
        policy: policy.policy,
      });
  return { ...stateOfAssessments(assessments), ...(plan ? { planState: plan.state } : {}) };
}

/** Works out the verdict lists show of a booking and writes it. */
export async function refreshVerdict(
  trx: SiteTransaction,
  where: { readonly siteId: string; readonly bookingId: string; readonly now: Date },
): Promise<BookingSetup> {
  const setup = await readBookingSetup(trx, where);
  if (!setup) throw new ServiceError('not-found');
  await writeBookingState(trx, where.siteId, where.bookingId, stateOf(setup), where.now);
  return setup;
}

/** The verdict at once, in the transaction of the change it follows from; the pre-check behind, in the background. */
export async function refreshBookingState(
  trx: SiteTransaction,
  where: { readonly siteId: string; readonly bookingId: string; readonly now: Date },
): Promise<BookingSetup> {
  const setup = await refreshVerdict(trx, where);
  await bookingsChanged(trx, where.siteId, [where.bookingId], where.now);
  return setup;
}
