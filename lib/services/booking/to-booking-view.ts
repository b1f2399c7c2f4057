import type { BookingOverview } from '@/db/queries/booking/bookings';
import type { BookingListItem } from '@/lib/schemas/booking';

export function toBookingListItem(booking: BookingOverview): BookingListItem {
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
    ...booking.state,
    ...(booking.planId === null ? {} : { planId: booking.planId }),
    ...(booking.planShortCode === null ? {} : { planShortCode: booking.planShortCode }),
    changedAt: booking.changedAt.toISOString(),
  };
}
