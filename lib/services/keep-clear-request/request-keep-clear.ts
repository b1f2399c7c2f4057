import { inTransaction } from '@/db/client';
import { findBooking } from '@/db/queries/booking/bookings';
import { insertKeepClearRequest } from '@/db/queries/keep-clear-request/keep-clear-requests';
import { authorise } from '@/lib/domain/access';
import { invalidField } from '@/lib/domain/errors';
import { keepClearPresetsFor } from '@/lib/domain/protocol/keep-clear-presets';
import { requestKeepClearInput } from '@/lib/schemas/keep-clear-request';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { refreshBookingState } from '../booking/refresh-booking-state';
import { nowOf, type ServiceContext } from '../context';

/**
 * What must stay free of fold in this exam, and how much beside it is tolerated. Earlier requests stay in the record;
 * the newest counts, for the verdict as booked, for the bench and for whether a sign-off is needed.
 */
export async function requestKeepClear(context: ServiceContext, input: unknown): Promise<void> {
  const { actor } = context;
  const { bookingId, ...form } = parseInput(requestKeepClearInput, input);
  const now = nowOf(context);
  await inTransaction(actor.siteId, async (trx) => {
    const booking = await findBooking(trx, actor.siteId, bookingId);
    authorise(actor, 'keep-clear.request', booking);
    const offered = keepClearPresetsFor(booking.region).map(({ key }) => key);
    if (form.keepClearPreset !== 'own' && !offered.includes(form.keepClearPreset)) {
      throw invalidField('keepClearPreset', `${form.keepClearPreset} given; allowed for the ${booking.region}: ${offered.join(', ')}, own`);
    }
    await insertKeepClearRequest(trx, {
      siteId: actor.siteId,
      bookingId,
      document: {
        schemaVersion: 1,
        keepClearPreset: form.keepClearPreset,
        keepClear: form.keepClear,
        toleratedFoldOutsidePct: form.toleratedFoldOutsidePct ?? null,
        note: form.note,
      },
      requestedBy: authorOf(actor),
      now,
    });
    await recordAudit(trx, context, {
      action: 'keep-clear.request', subjectType: 'booking', subjectId: bookingId, fields: ['keepClear', 'toleratedFoldOutsidePct'],
    });
    await refreshBookingState(trx, { siteId: actor.siteId, bookingId, now });
  });
}
