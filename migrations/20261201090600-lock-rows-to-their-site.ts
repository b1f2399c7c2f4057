import { type Kysely, sql } from 'kysely';

/** What the application may do to each table. Append-only tables have neither UPDATE nor DELETE. */
const APP_GRANTS: Record<string, string> = {
  site: 'select, update (name, accession_pattern)',
  app_user: 'select, insert, update',
  one_time_token: 'select, insert, update (used_at)',
  api_token: 'select, insert, update (revoked_at)',
  scanner: 'select, insert, update',
  scanner_version: 'select, insert',
  protocol: 'select, insert, update',
  protocol_version: 'select, insert',
  sequence: 'select, insert',
  site_policy: 'select, insert',
  booking: 'select, insert, update',
  booking_state: 'select, insert, update',
  booking_tombstone: 'select',
  size_reading: 'select, insert',
  plan: 'select, insert, update',
  plan_version: 'select, insert',
  sign_off: 'select, insert',
  outcome: 'select, insert',
  mail_outbox: 'select, insert, update (status, attempts, next_attempt_at, sent_at, last_error, payload)',
  audit_event: 'select, insert',
};

const RETENTION_DELETES = [
  'outcome',
  'sign_off',
  'plan_version',
  'plan',
  'size_reading',
  'booking_state',
  'booking',
];

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const [table, grants] of Object.entries(APP_GRANTS)) {
    const name = sql.table(table);
    const column = sql.ref(table === 'site' ? 'id' : 'site_id');
    await sql`alter table ${name} enable row level security`.execute(db);
    await sql`alter table ${name} force row level security`.execute(db);
    // After a transaction the setting is '' and not null; the bare cast of '' would throw.
    await sql`
      create policy site_isolation on ${name}
        using (${column} = nullif(current_setting('app.site_id', true), '')::uuid)
        with check (${column} = nullif(current_setting('app.site_id', true), '')::uuid)`.execute(db);
    await sql`grant ${sql.raw(grants)} on ${name} to selvedge_app`.execute(db);
  }
  for (const table of RETENTION_DELETES) {
    await sql`grant select, delete on ${sql.table(table)} to selvedge_retention`.execute(db);
  }
  await sql`grant select, insert on booking_tombstone to selvedge_retention`.execute(db);
  // Web and worker compare the schema with their own before they serve.
  await sql`grant select on kysely_migration to selvedge_app`.execute(db);
}
