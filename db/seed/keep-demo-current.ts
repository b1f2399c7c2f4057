import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import { DEMO_BOOKINGS } from './demo-bookings';
import { DEMO_SITE_ID, demoId } from './demo-ids';

/**
 * A demo that was made last week would open on an empty day. All demo bookings and sessions move on together by whole
 * days until the first booking is today again, and wait for a new check; on the same day nothing changes.
 */
export async function keepDemoCurrent(trx: SiteTransaction, now: Date): Promise<void> {
  const ids = DEMO_BOOKINGS.map(({ accession }) => demoId(`booking/${accession}`));
  const today = now.toISOString().slice(0, 10);
  const { rows } = await sql<{ days: number }>`
    select ${today}::date - min(scheduled_at at time zone 'UTC')::date as days
    from booking where site_id = ${DEMO_SITE_ID} and id = any(${ids}::uuid[])`.execute(trx);
  const days = rows[0]?.days ?? 0;
  if (days <= 0) return;
  await sql`
    update booking set scheduled_at = scheduled_at + make_interval(days => ${days}::int)
    where site_id = ${DEMO_SITE_ID} and id = any(${ids}::uuid[])`.execute(trx);
  await sql`
    update scanner_session set starts_at = starts_at + make_interval(days => ${days}::int), ends_at = ends_at + make_interval(days => ${days}::int)
    where site_id = ${DEMO_SITE_ID} and status = 'open'`.execute(trx);
  await sql`
    update booking_state set stale = 1, recheck_at = ${now}
    where site_id = ${DEMO_SITE_ID} and booking_id = any(${ids}::uuid[])`.execute(trx);
}
