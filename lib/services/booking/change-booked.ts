import { inTransaction } from '@/db/client';
import { changeBooking, findBooking } from '@/db/queries/booking/bookings';
import { findProtocol } from '@/db/queries/protocol/protocols';
import { findScanner } from '@/db/queries/scanner/scanners';
import { authorise } from '@/lib/domain/access';
import { invalidField, staleVersion } from '@/lib/domain/errors';
import type { BookingListItem } from '@/lib/schemas/booking';
import { changeBookedBody } from '@/lib/schemas/move-proposal';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { bookedChanged } from './booked-changed';
import { toBookingListItem } from './to-booking-view';

/** What the booking system says now. The screens propose; only this and imports change what is booked. */
export async function changeBooked(context: ServiceContext, input: { readonly id: string; readonly body: unknown }): Promise<BookingListItem> {
  const { actor } = context;
  const { siteId } = actor;
  const { expectedVersion, ...form } = parseInput(changeBookedBody, input.body);
  return inTransaction(siteId, async (trx) => {
    const before = await findBooking(trx, siteId, input.id);
    authorise(actor, 'booking.edit', before);
    if (before.version !== expectedVersion) throw staleVersion(before.version);
    const scanner = await findScanner(trx, siteId, form.scannerId);
    if (!scanner || scanner.archivedAt) throw invalidField('scannerId', 'not a scanner in use here; allowed: one of the site’s scanners');
    const protocol = await findProtocol(trx, siteId, form.protocolId);
    if (!protocol || protocol.archivedAt) throw invalidField('protocolId', 'not a protocol in use here; allowed: one of the site’s protocols');
    const scheduledAt = new Date(form.scheduledAt);
    const fields = [
      ...(before.scannerId === form.scannerId ? [] : ['scanner']),
      ...(before.protocolId === form.protocolId ? [] : ['protocol']),
      ...(before.scheduledAt.getTime() === scheduledAt.getTime() ? [] : ['scheduledAt']),
      ...(before.slotMinutes === form.slotMinutes ? [] : ['slotMinutes']),
    ];
    if (fields.length > 0) {
      const changed = await changeBooking(trx, siteId, input.id, expectedVersion, { ...form, scheduledAt, region: protocol.document.region }, nowOf(context));
      if (!changed) throw staleVersion(before.version + 1);
      await recordAudit(trx, context, { action: 'booking.edit', subjectType: 'booking', subjectId: input.id, fields });
      const to = { ...form, scheduledAt, scannerName: scanner.document.scanner.name };
      await bookedChanged(trx, context, [{ bookingId: input.id, from: before, to }]);
    }
    const after = await findBooking(trx, siteId, input.id);
    authorise(actor, 'booking.edit', after);
    return toBookingListItem(after);
  });
}
