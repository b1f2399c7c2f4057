import { inTransaction, type SiteTransaction } from '@/db/client';
import { findBooking, lockBooking, setEscalation, setSurgery, type BookingOverview } from '@/db/queries/booking/bookings';
import { insertEntry } from '@/db/queries/booking-entry/booking-entries';
import { authorise, type Action } from '@/lib/domain/access';
import type { EntryDocument, EntryKind } from '@/lib/domain/booking/entry';
import { ServiceError } from '@/lib/domain/errors';
import { queueMail } from '@/lib/mail';
import { addNoteInput } from '@/lib/schemas/booking-entry';
import { surgeryInput } from '@/lib/schemas/pre-check';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { thoseWhoMay } from '../mail/those-who-may';
import { bookingsChanged } from '../pre-check/mark-changed';

interface Line {
  readonly bookingId: string;
  readonly action: Action;
  readonly kind: EntryKind;
  readonly note?: string;
  readonly data?: Omit<EntryDocument, 'schemaVersion'>;
  readonly fields: readonly string[];
}

async function writeLine(context: ServiceContext, line: Line, act?: (trx: SiteTransaction, booking: BookingOverview) => Promise<void>): Promise<void> {
  const { actor } = context;
  await inTransaction(actor.siteId, async (trx) => {
    // Of two who ask or decide in the same moment, the second sees what the first did.
    if (act) await lockBooking(trx, actor.siteId, line.bookingId);
    const booking = await findBooking(trx, actor.siteId, line.bookingId);
    authorise(actor, line.action, booking);
    await act?.(trx, booking);
    await insertEntry(trx, actor, { ...line, now: nowOf(context) });
    await recordAudit(trx, context, { action: line.action, subjectType: 'booking', subjectId: line.bookingId, fields: line.fields });
  });
}

/** A note for whoever works on the booking next; it stays as it was written. */
export async function addNote(context: ServiceContext, input: unknown): Promise<void> {
  const { bookingId, note } = parseInput(addNoteInput, input);
  await writeLine(context, { bookingId, action: 'booking.note', kind: 'note', note, fields: ['note'] });
}

/** Asks a lead to decide, with why, and tells the leads by mail that one of them is asked. */
export async function escalateBooking(context: ServiceContext, input: unknown): Promise<void> {
  const { bookingId, note } = parseInput(addNoteInput, input);
  await writeLine(context, { bookingId, action: 'booking.escalate', kind: 'escalated', note, fields: ['escalation'] }, async (trx, booking) => {
    if (booking.state.escalation === 'open') throw new ServiceError('conflict', { message: 'A lead has been asked already; add a note instead.' });
    await setEscalation(trx, booking.siteId, booking.id, 'open', nowOf(context));
    for (const userId of await thoseWhoMay(trx, context.actor, 'booking.decide')) {
      await queueMail(trx, booking.siteId, { kind: 'escalation', to: { userId }, payload: { bookingId: booking.id, reference: booking.accession } });
    }
  });
}

/** A lead's decision. It is written down and changes no limit: over the table's limit nothing overrides. */
export async function decideBooking(context: ServiceContext, input: unknown): Promise<void> {
  const { bookingId, note } = parseInput(addNoteInput, input);
  await writeLine(context, { bookingId, action: 'booking.decide', kind: 'decided', note, fields: ['escalation'] }, async (trx, booking) => {
    if (booking.state.escalation !== 'open') throw new ServiceError('conflict', { message: 'Nobody has asked for a decision, or it was made already.' });
    await setEscalation(trx, booking.siteId, booking.id, 'decided', nowOf(context));
  });
}

/** The day of surgery that changes the body's size: sizes from before it count no more. */
export async function setSurgeryDay(context: ServiceContext, input: unknown): Promise<void> {
  const { bookingId, surgeryOn } = parseInput(surgeryInput, input);
  await writeLine(context, { bookingId, action: 'size-reading.record', kind: 'surgery', data: { surgeryOn }, fields: ['surgeryOn'] }, async (trx, booking) => {
    await setSurgery(trx, booking.siteId, booking.id, surgeryOn);
    await bookingsChanged(trx, booking.siteId, [booking.id], nowOf(context));
  });
}
