import { inTransaction } from '@/db/client';
import { authorise } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { manyBookingsInput } from '@/lib/schemas/pre-check';
import { parseInput } from '@/lib/schemas/parse-input';
import { nowOf, type ServiceContext } from '../context';
import { readQuestion } from '../pre-check/read-question';
import { findPlaces } from './find-places';
import { proposeMove } from './propose-move';

export interface ManyProposed {
  readonly proposed: number;
  /** What no move was proposed for, and why. */
  readonly skipped: readonly { readonly accession: string; readonly reason: string }[];
}

/** For each booking the soonest place on a scanner that fits. Each is a change of its own: one that finds no place stops no other. */
export async function proposeMoves(context: ServiceContext, input: unknown): Promise<ManyProposed> {
  const { actor } = context;
  authorise(actor, 'booking.propose');
  const { bookingIds } = parseInput(manyBookingsInput, input);
  const skipped: { accession: string; reason: string }[] = [];
  let proposed = 0;
  for (const bookingId of new Set(bookingIds)) {
    const found = await inTransaction(actor.siteId, async (trx) => {
      const setup = await readQuestion(trx, actor.siteId, bookingId);
      authorise(actor, 'booking.propose', setup?.booking);
      const { accession, state, moveProposed, scannerId } = setup!.booking;
      if (moveProposed) return { accession, reason: 'a move is proposed already' };
      const kind = state.check?.next.kind;
      if (kind !== 'propose' && kind !== 'propose-time') return { accession, reason: 'its check asks for no move' };
      const places = await findPlaces(trx, actor.siteId, setup!, nowOf(context));
      const fitting = places.scanners.filter((one) => one.standing === 'fits' && (kind === 'propose-time' || one.scannerId !== scannerId));
      const [first] = fitting
        .flatMap((one) => (one.starts ?? []).map((scheduledAt) => ({ scannerId: one.scannerId, scheduledAt })))
        .sort((a, b) => a.scheduledAt.localeCompare(b.scheduledAt));
      if (first) return { accession, place: { bookingId, ...first, slotMinutes: places.slotMinutes } };
      return { accession, reason: fitting.length === 0 ? 'no scanner fits as far as is known' : 'no free place, or room unknown' };
    });
    if (!found.place) {
      skipped.push({ accession: found.accession, reason: found.reason });
      continue;
    }
    try {
      await proposeMove(context, found.place);
      proposed += 1;
    } catch (error) {
      if (!(error instanceof ServiceError) || error.code !== 'invalid') throw error;
      skipped.push({ accession: found.accession, reason: Object.values(error.fields ?? {})[0] ?? error.message });
    }
  }
  return { proposed, skipped };
}
