import { inTransaction, type SiteTransaction } from '@/db/client';
import { insertEntry } from '@/db/queries/booking-entry/booking-entries';
import { findOpenMove, insertMove, settleMove } from '@/db/queries/move-proposal/move-proposals';
import { lockBookingState } from '@/db/queries/pre-check/check-results';
import { authorise } from '@/lib/domain/access';
import { invalidField, ServiceError } from '@/lib/domain/errors';
import { checkBookingOn, standingOf } from '@/lib/domain/pre-check/pre-check';
import { sessionStanding } from '@/lib/domain/pre-check/room';
import { dayOf } from '@/lib/domain/site/local-day';
import { parseInput } from '@/lib/schemas/parse-input';
import { proposeMoveInput, type MoveView, type ProposeMove } from '@/lib/schemas/move-proposal';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { nowOf, type ServiceContext } from '../context';
import { readQuestion, type CheckSetup } from '../pre-check/read-question';
import { readRoom } from './find-places';
import { entryPlace, samePlace, toMoveView } from './to-move-view';

/** Why a place cannot be proposed. Nothing overrides a scanner that is ruled out. */
async function refuseUnsuitable(trx: SiteTransaction, setup: CheckSetup, form: ProposeMove, now: Date): Promise<void> {
  const { booking, question } = setup;
  const scheduledAt = new Date(form.scheduledAt);
  const scanner = [question.scanner, ...question.others].find(({ id }) => id === form.scannerId);
  if (!scanner || scanner.archivedAt) throw invalidField('scannerId', 'not a scanner in use here; allowed: one of the site’s scanners');
  if (scheduledAt <= now) throw invalidField('scheduledAt', 'a moment that has passed; allowed: one to come');
  const place = { scannerId: form.scannerId, scheduledAt, slotMinutes: form.slotMinutes };
  if (samePlace(place, booking)) throw invalidField('scheduledAt', 'this is what is booked already; allowed: another scanner, start or slot');
  const standing = standingOf(checkBookingOn(question, scanner, false));
  if (standing.standing === 'ruled-out') throw invalidField('scannerId', `${standing.scannerName} is ruled out: ${standing.reason}`);
  const room = (await readRoom(trx, booking.siteId, dayOf(scheduledAt), booking.id))(form.scannerId);
  if (room.sessions.length > 0 && sessionStanding({ startsAt: scheduledAt, minutes: form.slotMinutes }, room.free) !== 'inside') {
    throw invalidField('scheduledAt', `${form.slotMinutes} min have no room there in the sessions of ${standing.scannerName}; allowed: a free place`);
  }
}

/** Proposes another scanner, time or slot, and makes the task of changing it where it is booked. */
export async function proposeMove(context: ServiceContext, input: unknown): Promise<MoveView> {
  const { actor } = context;
  const { siteId } = actor;
  authorise(actor, 'booking.propose');
  const form = parseInput(proposeMoveInput, input);
  const now = nowOf(context);
  return inTransaction(siteId, async (trx) => {
    // Two people proposing for one booking take turns; the later one replaces the earlier.
    await lockBookingState(trx, siteId, form.bookingId);
    const setup = await readQuestion(trx, siteId, form.bookingId);
    authorise(actor, 'booking.propose', setup?.booking);
    const { booking } = setup!;
    await refuseUnsuitable(trx, setup!, form, now);
    const open = await findOpenMove(trx, siteId, booking.id);
    if (open) await settleMove(trx, siteId, open.id, 'replaced', now);
    await insertMove(trx, siteId, {
      bookingId: booking.id,
      proposed: { scannerId: form.scannerId, scheduledAt: new Date(form.scheduledAt), slotMinutes: form.slotMinutes },
      booked: booking,
      reason: form.reason,
      by: authorOf(actor),
      now,
    });
    const made = await findOpenMove(trx, siteId, booking.id);
    if (!made) throw new ServiceError('not-found');
    await insertEntry(trx, actor, {
      bookingId: booking.id, kind: 'move-proposed', note: form.reason, now,
      data: { from: entryPlace(made.before), to: entryPlace(made.proposed) },
    });
    await recordAudit(trx, context, { action: 'booking.propose', subjectType: 'move', subjectId: made.id, fields: ['scanner', 'scheduledAt', 'slotMinutes'] });
    return toMoveView(made);
  });
}
