import { inTransaction } from '@/db/client';
import { findOpenMove, listMoves as readMoves } from '@/db/queries/move-proposal/move-proposals';
import { authorise } from '@/lib/domain/access';
import { writeCsv } from '@/lib/csv/write-csv';
import type { MoveView } from '@/lib/schemas/move-proposal';
import { recordAudit } from '../audit/record-audit';
import type { ServiceContext } from '../context';
import { toMoveView } from './to-move-view';

/** More open tasks than anybody works through; the list says when it was cut. */
const MOST_OPEN = 2000;
const MOST_SETTLED = 50;

export interface MoveList {
  readonly open: readonly MoveView[];
  readonly settled: readonly MoveView[];
}

/** What is to be changed in the booking system, oldest first, and what was settled last. */
export async function listMoves({ actor }: ServiceContext): Promise<MoveList> {
  authorise(actor, 'booking.read');
  return inTransaction(actor.siteId, async (trx) => ({
    open: (await readMoves(trx, actor.siteId, 'open', MOST_OPEN)).map(toMoveView),
    settled: (await readMoves(trx, actor.siteId, 'settled', MOST_SETTLED)).map(toMoveView),
  }));
}

export async function getOpenMove({ actor }: ServiceContext, input: { readonly bookingId: string }): Promise<MoveView | null> {
  authorise(actor, 'booking.read');
  const move = await inTransaction(actor.siteId, (trx) => findOpenMove(trx, actor.siteId, input.bookingId));
  if (move) authorise(actor, 'booking.read', move);
  return move && toMoveView(move);
}

const HEADER = ['Accession', 'Booked scanner', 'Booked start', 'Booked minutes', 'Proposed scanner', 'Proposed start', 'Proposed minutes', 'Reason', 'Proposed by'];

/** The open tasks as a file for whoever keeps the booking system. */
export async function exportMoves(context: ServiceContext): Promise<string> {
  const { actor } = context;
  authorise(actor, 'booking.export');
  return inTransaction(actor.siteId, async (trx) => {
    const open = (await readMoves(trx, actor.siteId, 'open', MOST_OPEN)).map(toMoveView);
    await recordAudit(trx, context, { action: 'booking.export', subjectType: 'site', subjectId: actor.siteId, fields: ['moves'] });
    return writeCsv(HEADER, open.map(({ accession, booked, proposed, reason, proposedBy }) => [
      accession, booked.scannerName, booked.scheduledAt, booked.slotMinutes,
      proposed.scannerName, proposed.scheduledAt, proposed.slotMinutes, reason, proposedBy,
    ]));
  });
}
