import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import { DEMO_BOOKINGS } from './demo-bookings';
import { DEMO_SITE_ID, demoId } from './demo-ids';

/**
 * A demo that was made last week would open on an empty day. All demo bookings move on together by whole days until
 * the first of them is today again; on the same day nothing changes.
 */
export async function keepDemoCurrent(trx: SiteTransaction, now: Date): Promise<void> {
  const ids = DEMO_BOOKINGS.map(({ accession }) => demoId(`booking/${accession}`));
  const today = now.toISOString().slice(0, 10);
  await sql`
    with first as (
      select min(scheduled_at at time zone 'UTC')::date as day
      from booking where site_id = ${DEMO_SITE_ID} and id = any(${ids}::uuid[])
    )
    update booking b
    set scheduled_at = b.scheduled_at + make_interval(days => ${today}::date - first.day)
    from first
    where b.site_id = ${DEMO_SITE_ID} and b.id = any(${ids}::uuid[]) and first.day < ${today}::date`.execute(trx);
}
