import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import { readPreCheckDocument, type PreCheckDocument } from '@/lib/domain/pre-check/document';
import { resultRank, type PreCheckResult } from '@/lib/domain/pre-check/result';

export interface CheckRecord {
  readonly number: number;
  readonly result: PreCheckResult;
  readonly checkedAt: Date;
  readonly document: PreCheckDocument;
}

/**
 * Locks a booking's state before anything it rests on is read: a change that comes meanwhile waits, marks the state
 * stale again after this check is written, and so is never lost.
 * @returns null when there is no such booking
 */
export async function lockBookingState(
  trx: SiteTransaction,
  siteId: string,
  bookingId: string,
): Promise<{ readonly stale: boolean; readonly checkNumber: number; readonly result: string } | null> {
  const row = await trx
    .selectFrom('booking_state')
    .select(['stale', 'check_number', 'result'])
    .where('site_id', '=', siteId)
    .where('booking_id', '=', bookingId)
    .forUpdate()
    .executeTakeFirst();
  return row ? { stale: row.stale === 1, checkNumber: row.check_number, result: row.result } : null;
}

export async function findInputHash(trx: SiteTransaction, siteId: string, bookingId: string, number: number): Promise<string | null> {
  const row = await trx
    .selectFrom('check_result')
    .select('input_hash')
    .where('site_id', '=', siteId)
    .where('booking_id', '=', bookingId)
    .where('number', '=', number)
    .executeTakeFirst();
  return row?.input_hash ?? null;
}

export async function findNewestCheck(trx: SiteTransaction, siteId: string, bookingId: string): Promise<CheckRecord | null> {
  const row = await trx
    .selectFrom('check_result')
    .select(['number', 'result', 'checked_at', 'data'])
    .where('site_id', '=', siteId)
    .where('booking_id', '=', bookingId)
    .orderBy('number', 'desc')
    .limit(1)
    .executeTakeFirst();
  return row
    ? { number: row.number, result: row.result as PreCheckResult, checkedAt: row.checked_at, document: readPreCheckDocument(row.data) }
    : null;
}

/** When the result became another one, newest first. */
export async function listResultChanges(
  trx: SiteTransaction,
  siteId: string,
  bookingId: string,
): Promise<{ readonly result: PreCheckResult; readonly at: Date }[]> {
  const { rows } = await sql<{ result: string; checked_at: Date }>`
    select result, checked_at from (
      select result, checked_at, number, lag(result) over (order by number) as before
      from check_result where site_id = ${siteId} and booking_id = ${bookingId}
    ) c where before is distinct from result order by number desc limit 50`.execute(trx);
  return rows.map((row) => ({ result: row.result as PreCheckResult, at: row.checked_at }));
}

export interface NewCheck {
  readonly siteId: string;
  readonly bookingId: string;
  readonly number: number;
  readonly document: PreCheckDocument;
  readonly engineVersion: string;
  readonly policyVersion: number;
  readonly inputHash: string;
  readonly now: Date;
}

export async function insertCheck(trx: SiteTransaction, check: NewCheck): Promise<void> {
  await trx
    .insertInto('check_result')
    .values({
      site_id: check.siteId,
      booking_id: check.bookingId,
      number: check.number,
      result: check.document.result,
      data: JSON.stringify(check.document),
      engine_version: check.engineVersion,
      policy_version: check.policyVersion,
      input_hash: check.inputHash,
      checked_at: check.now,
    })
    .execute();
}

/** The state follows the check; `changed` is for a check that says something else than the one before. */
export async function writeCheckedState(trx: SiteTransaction, check: NewCheck, changed: boolean): Promise<void> {
  const { document } = check;
  await trx
    .updateTable('booking_state')
    .set((eb) => ({
      result: document.result,
      result_rank: resultRank(document.result),
      minutes_over: document.minutesOver,
      next_kind: document.next.kind,
      next_text: document.next.text,
      check_number: check.number,
      stale: 0,
      ...(changed ? { changed_at: check.now } : {}),
      version: eb('version', '+', 1),
    }))
    .where('site_id', '=', check.siteId)
    .where('booking_id', '=', check.bookingId)
    .execute();
}

/** Nothing it rests on is different after all. */
export async function clearStale(trx: SiteTransaction, siteId: string, bookingId: string): Promise<void> {
  await trx.updateTable('booking_state').set({ stale: 0 }).where('site_id', '=', siteId).where('booking_id', '=', bookingId).execute();
}

export interface StaleFilter {
  readonly bookingIds?: readonly string[];
  readonly protocolId?: string;
  /** Bookings from this moment on. */
  readonly from?: Date;
  readonly before?: Date;
  readonly scannerId?: string;
}

/** Marks bookings whose check does not stand any more. @returns how many */
export async function markStale(trx: SiteTransaction, siteId: string, filter: StaleFilter, now: Date): Promise<number> {
  const { bookingIds, protocolId, from, before, scannerId } = filter;
  const { numAffectedRows } = await sql`
    update booking_state t set stale = 1, recheck_at = ${now}
    from booking b
    where t.site_id = ${siteId} and b.site_id = ${siteId} and b.id = t.booking_id
      and (${bookingIds ?? null}::uuid[] is null or b.id = any(${bookingIds ?? null}::uuid[]))
      and (${protocolId ?? null}::uuid is null or b.protocol_id = ${protocolId ?? null}::uuid)
      and (${scannerId ?? null}::uuid is null or b.booked_scanner_id = ${scannerId ?? null}::uuid)
      and (${from ?? null}::timestamptz is null or b.scheduled_at >= ${from ?? null}::timestamptz)
      and (${before ?? null}::timestamptz is null or b.scheduled_at < ${before ?? null}::timestamptz)`.execute(trx);
  return Number(numAffectedRows ?? 0);
}

const DAY_MS = 86_400_000;

/** Bookings that wait for a check and whose time has come: today's and the soonest scans first, older ones last. */
export async function listStale(trx: SiteTransaction, siteId: string, now: Date, limit: number): Promise<string[]> {
  const { rows } = await sql<{ booking_id: string }>`
    select s.booking_id
    from booking_state s
    join booking b on b.site_id = s.site_id and b.id = s.booking_id
    where s.site_id = ${siteId} and s.stale = 1 and s.recheck_at <= ${now}
    order by b.scheduled_at < ${new Date(now.getTime() - DAY_MS)}, b.scheduled_at, s.booking_id
    limit ${limit}`.execute(trx);
  return rows.map((row) => row.booking_id);
}

/** After a check that could not be finished: later, so that one booking never keeps the others waiting. */
export async function putOff(trx: SiteTransaction, siteId: string, bookingId: string, until: Date): Promise<void> {
  await trx
    .updateTable('booking_state').set({ recheck_at: until })
    .where('site_id', '=', siteId).where('booking_id', '=', bookingId).where('stale', '=', 1).execute();
}
