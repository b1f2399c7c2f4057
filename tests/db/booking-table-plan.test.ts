import { sql } from 'kysely';
import { describe, expect, it } from 'vitest';
import { inTransaction } from '@/db/client';
import { tableQuery } from '@/db/queries/booking/booking-table';
import { fillSite } from '@/tests/support/database/fill-site';

/** As the application role, under row-level security: every order of the table finds its days by an index. */
describe('the bookings table', () => {
  it.each(['time', 'result', 'over', 'changed'] as const)('ordered by %s reads the days asked for and no table whole', async (sort) => {
    const { siteId, bookingId } = await fillSite();
    const plan = await inTransaction(siteId, async (trx) => {
      // The tables are all but empty; without this the planner would rightly read them whole.
      await sql`set local enable_seqscan = off`.execute(trx);
      await sql`set local enable_bitmapscan = off`.execute(trx);
      const day = new Date('2030-01-01T00:00:00Z');
      const query = tableQuery(trx, siteId, {
        from: day, before: new Date('2030-01-15T00:00:00Z'), sort, descending: sort !== 'time', limit: 50,
        after: { key: 1, scheduledAt: day, id: bookingId },
      }).compile();
      const { rows } = await trx.executeQuery<{ 'QUERY PLAN': unknown }>({ ...query, sql: `explain (format json) ${query.sql}` });
      return JSON.stringify(rows[0]?.['QUERY PLAN']);
    });
    expect(plan).toMatch(/"Index Name":"booking_(scanner_)?time"|"Index Name":"booking_pkey"/);
    expect(plan).toContain('scheduled_at >=');
    expect(plan).not.toContain('Seq Scan');
  });
});
