import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import type { PreCheckResult } from '@/lib/domain/pre-check/result';

export interface WeekBooking {
  readonly id: string;
  readonly accession: string;
  readonly scannerId: string;
  readonly scheduledAt: Date;
  readonly slotMinutes: number;
  readonly result: PreCheckResult | null;
  /** Scan and set-up, minutes over the slot; null while not known. */
  readonly minutesNeeded: number | null;
  /** The result at `since`; null when there was none. */
  readonly before: PreCheckResult | null;
  readonly isNew: boolean;
}

/** Bookings of a span with what they came to now and at an earlier moment, in one query. */
export async function readWeek(
  trx: SiteTransaction,
  siteId: string,
  span: { readonly from: Date; readonly before: Date; readonly since: Date },
): Promise<WeekBooking[]> {
  const { rows } = await sql<{
    id: string; accession: string; booked_scanner_id: string; scheduled_at: Date; slot_minutes: number; result: string;
    needed: number | null; before: string | null; is_new: boolean;
  }>`
    select b.id, b.accession, b.booked_scanner_id, b.scheduled_at, b.slot_minutes, t.result,
      (n.data ->> 'minutesNeeded')::float8 as needed, c.result as before, b.created_at >= ${span.since} as is_new
    from booking b
    join booking_state t on t.site_id = b.site_id and t.booking_id = b.id
    left join check_result n on n.site_id = b.site_id and n.booking_id = b.id and n.number = t.check_number
    left join lateral (
      select r.result from check_result r
      where r.site_id = b.site_id and r.booking_id = b.id and r.checked_at < ${span.since}
      order by r.checked_at desc, r.number desc limit 1
    ) c on true
    where b.site_id = ${siteId} and b.scheduled_at >= ${span.from} and b.scheduled_at < ${span.before}
    order by b.scheduled_at, b.id`.execute(trx);
  return rows.map((row) => ({
    id: row.id,
    accession: row.accession,
    scannerId: row.booked_scanner_id,
    scheduledAt: row.scheduled_at,
    slotMinutes: row.slot_minutes,
    result: row.result === '' ? null : (row.result as PreCheckResult),
    minutesNeeded: row.needed === null || row.needed === 0 ? null : row.needed,
    before: row.before as PreCheckResult | null,
    isNew: row.is_new,
  }));
}
