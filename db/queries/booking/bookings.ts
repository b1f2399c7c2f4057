import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import type { BookingRecord, BookingState } from '@/lib/domain/booking/booking';
import type { BodyRegion, Verdict } from '@/lib/domain/case/model';
import type { PlanState } from '@/lib/domain/plan/states';
import type { NextActionKind, PreCheckResult } from '@/lib/domain/pre-check/result';

/** A booking with the names lists show, its state and its newest plan. */
export interface BookingOverview extends BookingRecord {
  readonly scannerName: string;
  readonly protocolName: string;
  readonly state: BookingState;
  readonly planId: string | null;
  readonly planShortCode: string | null;
  readonly changedAt: Date;
  /** YYYY-MM-DD of surgery that changes the body's size, or ''. */
  readonly surgeryOn: string;
  readonly version: number;
  /** A move is proposed and the booking system has not followed yet. */
  readonly moveProposed: boolean;
}

export function overviews(trx: SiteTransaction, siteId: string) {
  return trx
    .selectFrom('booking as b')
    .innerJoin('scanner as s', (join) => join.onRef('s.site_id', '=', 'b.site_id').onRef('s.id', '=', 'b.booked_scanner_id'))
    .innerJoin('protocol as p', (join) => join.onRef('p.site_id', '=', 'b.site_id').onRef('p.id', '=', 'b.protocol_id'))
    .innerJoin('booking_state as t', (join) => join.onRef('t.site_id', '=', 'b.site_id').onRef('t.booking_id', '=', 'b.id'))
    .leftJoinLateral(
      (from) =>
        from
          .selectFrom('plan')
          .select(['plan.id', 'plan.short_code'])
          .whereRef('plan.site_id', '=', 'b.site_id')
          .whereRef('plan.booking_id', '=', 'b.id')
          .orderBy('plan.created_at', 'desc')
          .orderBy('plan.id')
          .limit(1)
          .as('n'),
      (join) => join.onTrue(),
    )
    .leftJoin('move_proposal as m', (join) =>
      join.onRef('m.site_id', '=', 'b.site_id').onRef('m.booking_id', '=', 'b.id').on('m.status', '=', 'open'),
    )
    .select([
      'b.site_id', 'b.id', 'b.accession', 'b.scheduled_at', 'b.slot_minutes', 'b.body_region', 'b.booked_scanner_id',
      'b.protocol_id', 's.name as scanner_name', 'p.name as protocol_name', 't.verdict_worst', 't.plan_state',
      't.minutes_needed', 't.changed_at', 'n.id as plan_id', 'n.short_code', 'b.surgery_on', 'b.version', 't.result',
      't.result_rank', 't.minutes_over', 't.stale', 't.next_kind', 't.next_text', 't.escalation', 'm.id as move_id',
    ])
    .where('b.site_id', '=', siteId);
}

export type OverviewRow = Awaited<ReturnType<ReturnType<typeof overviews>['execute']>>[number];

/** Lists filter and sort on NOT NULL columns, so '' and 0 stand for "not known" in the table. */
export function toOverview(row: OverviewRow): BookingOverview {
  return {
    siteId: row.site_id,
    id: row.id,
    accession: row.accession,
    scheduledAt: row.scheduled_at,
    slotMinutes: row.slot_minutes,
    region: row.body_region as BodyRegion,
    scannerId: row.booked_scanner_id,
    protocolId: row.protocol_id,
    scannerName: row.scanner_name,
    protocolName: row.protocol_name,
    state: {
      ...(row.verdict_worst === '' ? {} : { verdict: row.verdict_worst as Verdict }),
      ...(row.plan_state === '' ? {} : { planState: row.plan_state as PlanState }),
      ...(row.minutes_needed === 0 ? {} : { minutesNeeded: row.minutes_needed }),
      ...(row.result === '' ? {} : {
        check: {
          result: row.result as PreCheckResult,
          minutesOver: row.minutes_over,
          next: { kind: row.next_kind as NextActionKind, text: row.next_text },
        },
      }),
      stale: row.stale === 1,
      ...(row.escalation === '' ? {} : { escalation: row.escalation as 'open' | 'decided' }),
    },
    planId: row.plan_id,
    planShortCode: row.short_code,
    changedAt: row.changed_at,
    surgeryOn: row.surgery_on,
    version: row.version,
    moveProposed: row.move_id !== null,
  };
}

export interface BookingWindow {
  /** From this moment on, and before that one. */
  readonly from: Date;
  readonly before: Date;
  readonly limit: number;
  /** Position of the last booking of the page before. */
  readonly after?: { readonly scheduledAt: Date; readonly id: string };
}

/** By time; one more than the limit is read, so that the caller knows whether there is a next page. */
export async function listBookings(trx: SiteTransaction, siteId: string, window: BookingWindow): Promise<BookingOverview[]> {
  let query = overviews(trx, siteId)
    .where('b.scheduled_at', '>=', window.from)
    .where('b.scheduled_at', '<', window.before)
    .orderBy('b.scheduled_at')
    .orderBy('b.id')
    .limit(window.limit + 1);
  if (window.after) {
    const { scheduledAt, id } = window.after;
    query = query.where(sql<boolean>`(b.scheduled_at, b.id) > (${scheduledAt}::timestamptz, ${id}::uuid)`);
  }
  return (await query.execute()).map(toOverview);
}

export async function findBooking(trx: SiteTransaction, siteId: string, id: string): Promise<BookingOverview | null> {
  const row = await overviews(trx, siteId).where('b.id', '=', id).executeTakeFirst();
  return row ? toOverview(row) : null;
}

/**
 * Holds the booking's row until the transaction ends: what is made for one booking follows instead of racing. Rows that
 * only refer to the booking may still be written meanwhile; holding those up as well would deadlock with a pre-check.
 */
export async function lockBooking(trx: SiteTransaction, siteId: string, id: string): Promise<void> {
  await trx.selectFrom('booking').select('id').where('site_id', '=', siteId).where('id', '=', id).forNoKeyUpdate().execute();
}

export async function accessionTaken(trx: SiteTransaction, siteId: string, accession: string): Promise<boolean> {
  const row = await trx
    .selectFrom('booking')
    .select('id')
    .where('site_id', '=', siteId)
    .where('accession', '=', accession)
    .executeTakeFirst();
  return row !== undefined;
}

/** The booking and its state row; they exist together or not at all. */
export async function insertBooking(
  trx: SiteTransaction,
  booking: Omit<BookingRecord, 'id'> & { readonly id?: string; readonly source: 'typed' | 'api' | 'import' },
  now: Date,
): Promise<string> {
  const { id } = await trx
    .insertInto('booking')
    .values({
      site_id: booking.siteId,
      ...(booking.id ? { id: booking.id } : {}),
      accession: booking.accession,
      scheduled_at: booking.scheduledAt,
      slot_minutes: booking.slotMinutes,
      body_region: booking.region,
      booked_scanner_id: booking.scannerId,
      protocol_id: booking.protocolId,
      source: booking.source,
    })
    .returning('id')
    .executeTakeFirstOrThrow();
  await trx
    .insertInto('booking_state')
    .values({ site_id: booking.siteId, booking_id: id, changed_at: now })
    .execute();
  return id;
}

/** The part of the state that follows sizes and plan at once; the check itself comes behind. */
export async function writeBookingState(
  trx: SiteTransaction,
  siteId: string,
  bookingId: string,
  state: Pick<BookingState, 'verdict' | 'planState' | 'minutesNeeded'>,
  now: Date,
): Promise<void> {
  await trx
    .updateTable('booking_state')
    .set((eb) => ({
      verdict_worst: state.verdict ?? '',
      plan_state: state.planState ?? '',
      minutes_needed: state.minutesNeeded ?? 0,
      changed_at: now,
      version: eb('version', '+', 1),
    }))
    .where('site_id', '=', siteId)
    .where('booking_id', '=', bookingId)
    .execute();
}

/** @returns false when the version is not the newest any more */
export async function changeBooking(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  expectedVersion: number,
  to: Pick<BookingRecord, 'scheduledAt' | 'slotMinutes' | 'scannerId' | 'protocolId' | 'region'>,
  now: Date,
): Promise<boolean> {
  const changed = await trx
    .updateTable('booking')
    .set({
      scheduled_at: to.scheduledAt, slot_minutes: to.slotMinutes, booked_scanner_id: to.scannerId, protocol_id: to.protocolId,
      body_region: to.region, version: expectedVersion + 1,
    })
    .where('site_id', '=', siteId).where('id', '=', id).where('version', '=', expectedVersion).executeTakeFirst();
  if (changed.numUpdatedRows !== 1n) return false;
  await trx.updateTable('booking_state').set({ changed_at: now }).where('site_id', '=', siteId).where('booking_id', '=', id).execute();
  return true;
}

export async function setSurgery(trx: SiteTransaction, siteId: string, id: string, surgeryOn: string): Promise<void> {
  await trx.updateTable('booking').set({ surgery_on: surgeryOn }).where('site_id', '=', siteId).where('id', '=', id).execute();
}

export async function setEscalation(trx: SiteTransaction, siteId: string, id: string, escalation: 'open' | 'decided', now: Date): Promise<void> {
  await trx
    .updateTable('booking_state').set({ escalation, changed_at: now })
    .where('site_id', '=', siteId).where('booking_id', '=', id).execute();
}
