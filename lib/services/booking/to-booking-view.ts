import type { BookingOverview } from '@/db/queries/booking/bookings';
import type { BookingListItem } from '@/lib/schemas/booking';

export function toBookingListItem(booking: BookingOverview): BookingListItem {
  const { check, stale, ...state } = booking.state;
  return {
    id: booking.id,
    accession: booking.accession,
    scheduledAt: booking.scheduledAt.toISOString(),
    slotMinutes: booking.slotMinutes,
    region: booking.region,
    scannerId: booking.scannerId,
    scannerName: booking.scannerName,
    protocolId: booking.protocolId,
    protocolName: booking.protocolName,
    ...state,
    ...(check ? { result: check.result, minutesOver: check.minutesOver, next: check.next } : {}),
    stale: stale ?? true,
    moveProposed: booking.moveProposed,
    ...(booking.surgeryOn === '' ? {} : { surgeryOn: booking.surgeryOn }),
    version: booking.version,
    ...(booking.planId === null ? {} : { planId: booking.planId }),
    ...(booking.planShortCode === null ? {} : { planShortCode: booking.planShortCode }),
    changedAt: booking.changedAt.toISOString(),
  };
}
