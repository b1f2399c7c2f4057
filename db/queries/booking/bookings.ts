import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import type { BookingRecord, BookingState } from '@/lib/domain/booking/booking';
import type { BodyRegion, Verdict } from '@/lib/domain/case/model';
import type { PlanState } from '@/lib/domain/plan/states';

/** A booking with the names lists show, its state and its newest plan. */
export interface BookingOverview extends BookingRecord {
  readonly scannerName: string;
  readonly protocolName: string;
  readonly state: BookingState;
  readonly planId: string | null;
  readonly planShortCode: string | null;
  readonly changedAt: Date;
}

function overviews(trx: SiteTransaction, siteId: string) {
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
    .select([
      'b.site_id', 'b.id', 'b.accession', 'b.scheduled_at', 'b.slot_minutes', 'b.body_region', 'b.booked_scanner_id',
      'b.protocol_id', 's.name as scanner_name', 'p.name as protocol_name', 't.verdict_worst', 't.plan_state',
      't.minutes_needed', 't.changed_at', 'n.id as plan_id', 'n.short_code',
    ])
    .where('b.site_id', '=', siteId);
}

type OverviewRow = Awaited<ReturnType<ReturnType<typeof overviews>['execute']>>[number];

/** Lists filter and sort on NOT NULL columns, so '' and 0 stand for "not known" in the table. */
function toOverview(row: OverviewRow): BookingOverview {
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
    },
    planId: row.plan_id,
    planShortCode: row.short_code,
    changedAt: row.changed_at,
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

/** Holds the booking's row until the transaction ends: what is made for one booking follows instead of racing. */
export async function lockBooking(trx: SiteTransaction, siteId: string, id: string): Promise<void> {
  await trx.selectFrom('booking').select('id').where('site_id', '=', siteId).where('id', '=', id).forUpdate().execute();
}

/** Bookings from a moment on that have no plan yet: their state follows scanner, protocol and policy. */
export async function listUnplannedBookingIds(
  trx: SiteTransaction,
  siteId: string,
  filter: { readonly from: Date; readonly scannerId?: string; readonly protocolId?: string },
): Promise<string[]> {
  let query = trx
    .selectFrom('booking as b')
    .leftJoin('plan as n', (join) => join.onRef('n.site_id', '=', 'b.site_id').onRef('n.booking_id', '=', 'b.id'))
    .select('b.id')
    .where('b.site_id', '=', siteId)
    .where('b.scheduled_at', '>=', filter.from)
    .where('n.id', 'is', null)
    .orderBy('b.scheduled_at')
    .orderBy('b.id');
  if (filter.scannerId) query = query.where('b.booked_scanner_id', '=', filter.scannerId);
  if (filter.protocolId) query = query.where('b.protocol_id', '=', filter.protocolId);
  return (await query.execute()).map(({ id }) => id);
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

export async function writeBookingState(
  trx: SiteTransaction,
  siteId: string,
  bookingId: string,
  state: BookingState,
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
