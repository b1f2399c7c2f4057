import { randomUUID } from 'node:crypto';
import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import { inTransaction } from '@/db/client';
import { ownerDatabase } from './owner-database';

export interface FilledSite {
  readonly siteId: string;
  readonly userId: string;
  readonly bookingId: string;
  readonly planId: string;
  /** One row of every table, as JSON. */
  readonly rows: Readonly<Record<string, unknown>>;
}

const DOCUMENT = JSON.stringify({ schemaVersion: 1 });

/** A site with one row in every table: for tests of what the database itself guarantees. */
export async function fillSite(): Promise<FilledSite> {
  const ids = {
    siteId: randomUUID(),
    userId: randomUUID(),
    scannerId: randomUUID(),
    protocolId: randomUUID(),
    bookingId: randomUUID(),
    planId: randomUUID(),
  };
  // As the owner, who may write to all of them; row-level security holds it to this site all the same.
  const rows = await inTransaction(
    ids.siteId,
    async (trx) => {
      await insertAll(trx, ids);
      return readBack(trx);
    },
    ownerDatabase(),
  );
  return { siteId: ids.siteId, userId: ids.userId, bookingId: ids.bookingId, planId: ids.planId, rows };
}

async function insertAll(
  trx: SiteTransaction,
  ids: Record<'siteId' | 'userId' | 'scannerId' | 'protocolId' | 'bookingId' | 'planId', string>,
): Promise<void> {
  const site_id = ids.siteId;
  const by = ids.userId;
  const later = new Date('2030-01-01T00:00:00Z');
  await trx.insertInto('site').values({ id: site_id, name: 'Filled', accession_pattern: '@#' }).execute();
  await trx
    .insertInto('app_user')
    .values({ site_id, id: by, email: `${by}@filled.example`, display_name: 'Filler', roles: ['lead'] })
    .execute();
  await trx
    .insertInto('one_time_token')
    .values({ site_id, kind: 'set-password', token_hash: `t-${site_id}`, user_id: by, expires_at: later })
    .execute();
  await trx
    .insertInto('api_token')
    .values({ site_id, name: 'Machine', token_hash: `a-${site_id}`, scopes: [], expires_at: later, created_by: by })
    .execute();
  await trx.insertInto('scanner').values({ site_id, id: ids.scannerId, name: 'One' }).execute();
  await trx
    .insertInto('scanner_version')
    .values({ site_id, scanner_id: ids.scannerId, version: 1, data: DOCUMENT, created_by: by })
    .execute();
  await trx.insertInto('protocol').values({ site_id, id: ids.protocolId, name: 'One', region: 'abdomen' }).execute();
  await trx
    .insertInto('protocol_version')
    .values({ site_id, protocol_id: ids.protocolId, version: 1, data: DOCUMENT, created_by: by })
    .execute();
  await trx
    .insertInto('sequence')
    .values({
      site_id,
      protocol_id: ids.protocolId,
      protocol_version: 1,
      position: 0,
      name: 'One',
      family: 'gradient-echo',
      data: DOCUMENT,
    })
    .execute();
  await trx.insertInto('site_policy').values({ site_id, version: 1, data: DOCUMENT, created_by: by }).execute();
  await trx
    .insertInto('booking')
    .values({
      site_id,
      id: ids.bookingId,
      accession: 'F1',
      booked_scanner_id: ids.scannerId,
      protocol_id: ids.protocolId,
      body_region: 'abdomen',
      scheduled_at: later,
      slot_minutes: 45,
      source: 'typed',
    })
    .execute();
  await trx.insertInto('booking_state').values({ site_id, booking_id: ids.bookingId }).execute();
  await trx.insertInto('booking_tombstone').values({ site_id, booking_id: randomUUID(), reason: 'kept long enough' }).execute();
  await trx
    .insertInto('size_reading')
    .values({
      site_id,
      booking_id: ids.bookingId,
      quantity: 'girth',
      value: 1200,
      source: 'measured',
      taken_on: '2029-12-01',
      recorded_by: by,
    })
    .execute();
  await trx
    .insertInto('plan')
    .values({ site_id, id: ids.planId, booking_id: ids.bookingId, short_code: 'FILL' })
    .execute();
  await trx
    .insertInto('plan_version')
    .values({
      site_id,
      plan_id: ids.planId,
      version: 1,
      data: DOCUMENT,
      result: DOCUMENT,
      engine_version: '1',
      policy_version: 1,
      input_hash: 'h',
      idempotency_key: 'first-save',
      created_by: by,
    })
    .execute();
  await trx
    .insertInto('sign_off')
    .values({ site_id, plan_id: ids.planId, plan_version: 1, decision: 'signed off', signed_by: by })
    .execute();
  await trx
    .insertInto('outcome')
    .values({ site_id, plan_id: ids.planId, plan_version: 1, wrap: 'none', data: DOCUMENT, recorded_by: by })
    .execute();
  await trx
    .insertInto('keep_clear_request')
    .values({ site_id, booking_id: ids.bookingId, data: DOCUMENT, requested_by: by })
    .execute();
  await trx
    .insertInto('plan_sheet')
    .values({ site_id, plan_id: ids.planId, plan_version: 1, paper: 'A4', content_hash: '0'.repeat(64), requested_by: by })
    .execute();
  await trx
    .insertInto('check_result')
    .values({
      site_id, booking_id: ids.bookingId, number: 1, result: 'as-booked', data: DOCUMENT, engine_version: '1', policy_version: 1, input_hash: 'h',
    })
    .execute();
  await trx
    .insertInto('scanner_session')
    .values({
      site_id, scanner_id: ids.scannerId, starts_at: later, ends_at: new Date(later.getTime() + 3_600_000), created_by: by,
    })
    .execute();
  await trx
    .insertInto('move_proposal')
    .values({
      site_id, booking_id: ids.bookingId, scanner_id: ids.scannerId, scheduled_at: later, slot_minutes: 60,
      booked_scanner_id: ids.scannerId, booked_at: later, booked_slot_minutes: 45, proposed_by: by,
    })
    .execute();
  await trx
    .insertInto('booking_entry')
    .values({ site_id, booking_id: ids.bookingId, kind: 'note', note: 'Seen', data: DOCUMENT, actor_kind: 'user', actor_id: by })
    .execute();
  await trx
    .insertInto('mail_outbox')
    .values({ site_id, message_id: `<${by}@filled.example>`, kind: 'invitation', to_user_id: by, payload: DOCUMENT })
    .execute();
  const batch_id = randomUUID();
  await trx.insertInto('import_settings').values({ site_id, data: DOCUMENT, saved_by: by }).execute();
  await trx.insertInto('import_batch').values({ site_id, id: batch_id, format: 'csv', created_by: by }).execute();
  await trx
    .insertInto('import_row')
    .values({
      site_id, batch_id, number: 1, accession: 'F2', scheduled_at: later, slot_minutes: 45, scanner_id: ids.scannerId,
      protocol_id: ids.protocolId, data: DOCUMENT,
    })
    .execute();
  await trx
    .insertInto('size_request')
    .values({ site_id, booking_id: ids.bookingId, token_hash: `s-${site_id}`, expires_at: later, asked_by: by })
    .execute();
  const demonstration_id = randomUUID();
  await trx.insertInto('demonstration').values({ site_id, id: demonstration_id, title: 'Shown', created_by: by }).execute();
  await trx.insertInto('scene').values({ site_id, id: randomUUID(), demonstration_id, position: 0, data: DOCUMENT }).execute();
  await trx
    .insertInto('demonstration_hand_out')
    .values({ site_id, demonstration_id, paper: 'A4', content_hash: '0'.repeat(64), requested_by: by })
    .execute();
  await trx
    .insertInto('demonstration_share')
    .values({ site_id, demonstration_id, token_hash: `d-${site_id}`, expires_at: later, created_by: by })
    .execute();
  await trx
    .insertInto('audit_event')
    .values({
      site_id,
      actor_id: by,
      actor_kind: 'user',
      action: 'plan.create',
      subject_type: 'plan',
      subject_id: ids.planId,
    })
    .execute();
}

async function readBack(trx: SiteTransaction): Promise<Record<string, unknown>> {
  const { rows: tables } = await sql<{ name: string }>`
    select relname as name from pg_class
    where relnamespace = 'public'::regnamespace and relkind = 'r' and relname not like 'kysely\\_%'`.execute(trx);
  const found: Record<string, unknown> = {};
  for (const { name } of tables) {
    const { rows } = await sql<{ row: unknown }>`select to_jsonb(t) as row from ${sql.table(name)} t limit 1`.execute(trx);
    found[name] = rows[0]?.row;
  }
  return found;
}
