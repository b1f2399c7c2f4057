import { type CompiledQuery, sql } from 'kysely';
import { beforeAll, describe, expect, it } from 'vitest';
import type { SiteTransaction } from '@/db/client';
import { inTransaction } from '@/db/client';
import { type FilledSite, fillSite } from '@/tests/support/database/fill-site';

/**
 * Under row-level security an operator that is not leakproof loses its index. These are the questions the product asks
 * all day; each must find its rows by an index that begins with the site, as the application role.
 */
describe('plans of the everyday queries', () => {
  let site: FilledSite;
  beforeAll(async () => {
    site = await fillSite();
  });

  const day = new Date('2030-01-01T00:00:00Z');
  const QUERIES: Record<string, (trx: SiteTransaction, siteId: string) => { compile(): CompiledQuery }> = {
    booking_time: (trx, siteId) =>
      trx.selectFrom('booking').select('id').where('site_id', '=', siteId).where('scheduled_at', '>=', day).orderBy('scheduled_at').orderBy('id').limit(50),
    booking_site_id_accession_key: (trx, siteId) =>
      trx.selectFrom('booking').select('id').where('site_id', '=', siteId).where('accession', '=', 'F1'),
    booking_scanner_time: (trx, siteId) =>
      trx.selectFrom('booking').select('id').where('site_id', '=', siteId).where('booked_scanner_id', '=', siteId).where('scheduled_at', '>=', day),
    booking_state_result: (trx, siteId) =>
      trx.selectFrom('booking_state').select('booking_id').where('site_id', '=', siteId).where('result', '=', 'plan-needed').orderBy('booking_id').limit(50),
    size_reading_newest: (trx, siteId) =>
      trx.selectFrom('size_reading').select('value').where('site_id', '=', siteId).where('booking_id', '=', siteId),
    plan_booking: (trx, siteId) =>
      trx.selectFrom('plan').select('id').where('site_id', '=', siteId).where('booking_id', '=', siteId),
    plan_site_id_short_code_key: (trx, siteId) =>
      trx.selectFrom('plan').select('id').where('site_id', '=', siteId).where('short_code', '=', 'FILL'),
    plan_version_site_id_plan_id_idempotency_key_key: (trx, siteId) =>
      trx.selectFrom('plan_version').select('version').where('site_id', '=', siteId).where('plan_id', '=', siteId).where('idempotency_key', '=', 'first-save'),
    keep_clear_request_booking: (trx, siteId) =>
      trx.selectFrom('keep_clear_request').select('data').where('site_id', '=', siteId).where('booking_id', '=', siteId).orderBy('requested_at', 'desc').limit(1),
    outcome_plan: (trx, siteId) =>
      trx.selectFrom('outcome').select('wrap').where('site_id', '=', siteId).where('plan_id', '=', siteId).orderBy('recorded_at', 'desc').limit(1),
    plan_sheet_site_id_plan_id_plan_version_paper_content_hash_key: (trx, siteId) =>
      trx.selectFrom('plan_sheet').select('status').where('site_id', '=', siteId).where('plan_id', '=', siteId).where('plan_version', '=', 1).where('paper', '=', 'A4').where('content_hash', '=', 'h'),
    booking_state_stale: (trx, siteId) =>
      trx.selectFrom('booking_state').select('booking_id').where('site_id', '=', siteId).where('stale', '=', 1).where('recheck_at', '<=', day).orderBy('recheck_at').orderBy('booking_id').limit(100),
    check_result_pkey: (trx, siteId) =>
      trx.selectFrom('check_result').select('data').where('site_id', '=', siteId).where('booking_id', '=', siteId).orderBy('number', 'desc').limit(1),
    scanner_session_time: (trx, siteId) =>
      trx.selectFrom('scanner_session').select('id').where('site_id', '=', siteId).where('starts_at', '>=', day).where('starts_at', '<', day),
    move_proposal_room: (trx, siteId) =>
      trx.selectFrom('move_proposal').select('id').where('site_id', '=', siteId).where('scanner_id', '=', siteId).where('status', '=', 'open').where('scheduled_at', '>=', day),
    booking_entry_time: (trx, siteId) =>
      trx.selectFrom('booking_entry').select('note').where('site_id', '=', siteId).where('booking_id', '=', siteId).orderBy('written_at', 'desc').limit(50),
    demonstration_newest: (trx, siteId) =>
      trx.selectFrom('demonstration').select('id').where('site_id', '=', siteId).where('put_away', '=', 0).orderBy('changed_at', 'desc').orderBy('id', 'desc').limit(200),
    scene_order: (trx, siteId) =>
      trx.selectFrom('scene').select('data').where('site_id', '=', siteId).where('demonstration_id', '=', siteId).where('removed', '=', 0).orderBy('position').orderBy('id'),
    demonstration_share_newest: (trx, siteId) =>
      trx.selectFrom('demonstration_share').select('openings').where('site_id', '=', siteId).where('demonstration_id', '=', siteId).orderBy('created_at', 'desc'),
    demonstration_hand_out_site_id_demonstration_id_paper_conte_key: (trx, siteId) =>
      trx.selectFrom('demonstration_hand_out').select('status').where('site_id', '=', siteId).where('demonstration_id', '=', siteId).where('paper', '=', 'A4').where('content_hash', '=', 'h'),
    audit_event_newest: (trx, siteId) =>
      trx.selectFrom('audit_event').select('id').where('site_id', '=', siteId).orderBy('at', 'desc').orderBy('id', 'desc').limit(50),
    mail_outbox_newest: (trx, siteId) =>
      trx.selectFrom('mail_outbox').select('id').where('site_id', '=', siteId).orderBy('created_at', 'desc').orderBy('id', 'desc').limit(50),
  };

  it.each(Object.keys(QUERIES))('%s', async (index) => {
    const plan = await inTransaction(site.siteId, async (trx) => {
      // The tables are all but empty; without this the planner would rightly read them whole.
      await sql`set local enable_seqscan = off`.execute(trx);
      await sql`set local enable_bitmapscan = off`.execute(trx);
      const query = QUERIES[index]!(trx, site.siteId).compile();
      const { rows } = await trx.executeQuery<{ 'QUERY PLAN': unknown }>({
        ...query,
        sql: `explain (format json) ${query.sql}`,
      });
      return JSON.stringify(rows[0]?.['QUERY PLAN']);
    });
    // Among all but empty tables two indexes cost the same, so another one of the site may be taken; what must not
    // happen is that the site is no longer a condition of the index, or that the index meant for it is gone.
    expect(plan).toMatch(/"Index Cond":"\(+site_id = /);
    const { rows } = await inTransaction(site.siteId, (trx) =>
      sql<{ indexdef: string }>`select indexdef from pg_indexes where indexname = ${index}`.execute(trx),
    );
    expect(rows[0]?.indexdef).toMatch(/\(site_id, /);
  });
});
