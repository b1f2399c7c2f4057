import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import type { Taken } from '@/lib/domain/pre-check/room';

export interface Place {
  readonly scannerId: string;
  readonly scheduledAt: Date;
  readonly slotMinutes: number;
}

export type MoveStatus = 'open' | 'agreed' | 'withdrawn' | 'replaced';

export interface MoveRecord {
  readonly siteId: string;
  readonly id: string;
  readonly bookingId: string;
  readonly accession: string;
  readonly protocolName: string;
  readonly status: MoveStatus;
  readonly proposed: Place & { readonly scannerName: string };
  /** As it was booked when the move was proposed, and as it is now. */
  readonly before: Place & { readonly scannerName: string };
  readonly booked: Place & { readonly scannerName: string };
  readonly reason: string;
  readonly proposedBy: string;
  readonly proposedAt: Date;
  readonly settledAt: Date | null;
}

function moves(trx: SiteTransaction, siteId: string) {
  return trx
    .selectFrom('move_proposal as m')
    .innerJoin('booking as b', (join) => join.onRef('b.site_id', '=', 'm.site_id').onRef('b.id', '=', 'm.booking_id'))
    .innerJoin('protocol as p', (join) => join.onRef('p.site_id', '=', 'b.site_id').onRef('p.id', '=', 'b.protocol_id'))
    .innerJoin('scanner as s', (join) => join.onRef('s.site_id', '=', 'm.site_id').onRef('s.id', '=', 'm.scanner_id'))
    .innerJoin('scanner as o', (join) => join.onRef('o.site_id', '=', 'm.site_id').onRef('o.id', '=', 'm.booked_scanner_id'))
    .innerJoin('scanner as n', (join) => join.onRef('n.site_id', '=', 'b.site_id').onRef('n.id', '=', 'b.booked_scanner_id'))
    .innerJoin('app_user as u', (join) => join.onRef('u.site_id', '=', 'm.site_id').onRef('u.id', '=', 'm.proposed_by'))
    .select([
      'm.site_id', 'm.id', 'm.booking_id', 'm.status', 'm.scanner_id', 'm.scheduled_at', 'm.slot_minutes', 'm.booked_scanner_id',
      'm.booked_at', 'm.booked_slot_minutes', 'm.reason', 'm.proposed_at', 'm.settled_at', 'b.accession', 'p.name as protocol_name',
      's.name as proposed_name', 'o.name as before_name', 'n.name as booked_name', 'b.booked_scanner_id as now_scanner_id',
      'b.scheduled_at as now_at', 'b.slot_minutes as now_minutes', 'u.display_name',
    ])
    .where('m.site_id', '=', siteId);
}

type MoveRow = Awaited<ReturnType<ReturnType<typeof moves>['execute']>>[number];

function toMove(row: MoveRow): MoveRecord {
  return {
    siteId: row.site_id,
    id: row.id,
    bookingId: row.booking_id,
    accession: row.accession,
    protocolName: row.protocol_name,
    status: row.status as MoveStatus,
    proposed: { scannerId: row.scanner_id, scannerName: row.proposed_name, scheduledAt: row.scheduled_at, slotMinutes: row.slot_minutes },
    before: { scannerId: row.booked_scanner_id, scannerName: row.before_name, scheduledAt: row.booked_at, slotMinutes: row.booked_slot_minutes },
    booked: { scannerId: row.now_scanner_id, scannerName: row.booked_name, scheduledAt: row.now_at, slotMinutes: row.now_minutes },
    reason: row.reason,
    proposedBy: row.display_name,
    proposedAt: row.proposed_at,
    settledAt: row.settled_at,
  };
}

/** Open moves, oldest first; or those settled last. */
export async function listMoves(trx: SiteTransaction, siteId: string, which: 'open' | 'settled', limit: number): Promise<MoveRecord[]> {
  const query = which === 'open'
    ? moves(trx, siteId).where('m.status', '=', 'open').orderBy('m.proposed_at').orderBy('m.id')
    : moves(trx, siteId).where('m.status', 'in', ['agreed', 'withdrawn']).orderBy('m.settled_at', 'desc').orderBy('m.id');
  return (await query.limit(limit).execute()).map(toMove);
}

export async function findOpenMove(trx: SiteTransaction, siteId: string, bookingId: string): Promise<MoveRecord | null> {
  const row = await moves(trx, siteId).where('m.booking_id', '=', bookingId).where('m.status', '=', 'open').executeTakeFirst();
  return row ? toMove(row) : null;
}

export async function settleMove(trx: SiteTransaction, siteId: string, id: string, status: Exclude<MoveStatus, 'open'>, now: Date): Promise<boolean> {
  const settled = await trx
    .updateTable('move_proposal').set({ status, settled_at: now })
    .where('site_id', '=', siteId).where('id', '=', id).where('status', '=', 'open').executeTakeFirst();
  return settled.numUpdatedRows === 1n;
}

/**
 * Closes every open move that the booking system has followed: scanner, start and slot are as proposed. For one
 * booking or, after an import, for all that it touched.
 * @returns booking ids whose move is closed
 */
export async function settleAgreedMoves(trx: SiteTransaction, siteId: string, bookingIds: readonly string[], now: Date): Promise<string[]> {
  const { rows } = await sql<{ booking_id: string }>`
    update move_proposal m set status = 'agreed', settled_at = ${now}
    from booking b
    where m.site_id = ${siteId} and m.status = 'open' and m.booking_id = any(${bookingIds}::uuid[])
      and b.site_id = ${siteId} and b.id = m.booking_id
      and b.booked_scanner_id = m.scanner_id and b.scheduled_at = m.scheduled_at and b.slot_minutes = m.slot_minutes
    returning m.booking_id`.execute(trx);
  return rows.map(({ booking_id }) => booking_id);
}

export async function insertMove(
  trx: SiteTransaction,
  siteId: string,
  move: { readonly bookingId: string; readonly proposed: Place; readonly booked: Place; readonly reason: string; readonly by: string; readonly now: Date },
): Promise<string> {
  const { id } = await trx
    .insertInto('move_proposal')
    .values({
      site_id: siteId,
      booking_id: move.bookingId,
      scanner_id: move.proposed.scannerId,
      scheduled_at: move.proposed.scheduledAt,
      slot_minutes: move.proposed.slotMinutes,
      booked_scanner_id: move.booked.scannerId,
      booked_at: move.booked.scheduledAt,
      booked_slot_minutes: move.booked.slotMinutes,
      reason: move.reason,
      proposed_by: move.by,
      proposed_at: move.now,
    })
    .returning('id')
    .executeTakeFirstOrThrow();
  return id;
}

export interface TakenOn extends Taken {
  readonly scannerId: string;
  readonly bookingId: string;
}

/** What is taken in a span on every scanner: bookings, and places that moves are proposed to. */
export async function listTaken(trx: SiteTransaction, siteId: string, span: { readonly from: Date; readonly before: Date }): Promise<TakenOn[]> {
  const booked = await trx
    .selectFrom('booking')
    .select(['id', 'booked_scanner_id', 'scheduled_at', 'slot_minutes'])
    .where('site_id', '=', siteId).where('scheduled_at', '>=', span.from).where('scheduled_at', '<', span.before)
    .execute();
  const proposed = await trx
    .selectFrom('move_proposal')
    .select(['booking_id', 'scanner_id', 'scheduled_at', 'slot_minutes'])
    .where('site_id', '=', siteId).where('status', '=', 'open')
    .where('scheduled_at', '>=', span.from).where('scheduled_at', '<', span.before)
    .execute();
  return [
    ...booked.map((row) => ({ bookingId: row.id, scannerId: row.booked_scanner_id, startsAt: row.scheduled_at, minutes: row.slot_minutes })),
    ...proposed.map((row) => ({ bookingId: row.booking_id, scannerId: row.scanner_id, startsAt: row.scheduled_at, minutes: row.slot_minutes })),
  ];
}
