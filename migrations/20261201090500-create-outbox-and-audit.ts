import { type Kysely, sql } from 'kysely';

export async function up(db: Kysely<unknown>): Promise<void> {
  // The row is the message: its Message-ID is fixed when the event happens, so a second delivery is the same mail.
  await sql`
    create table mail_outbox (
      site_id uuid not null references site (id),
      id uuid not null default gen_random_uuid(),
      message_id text not null,
      kind text not null,
      to_user_id uuid,
      to_address text,
      payload jsonb not null check (jsonb_typeof(payload -> 'schemaVersion') = 'number'),
      status text not null default 'queued' check (status in ('queued', 'sent', 'failed')),
      attempts integer not null default 0,
      next_attempt_at timestamptz not null default now(),
      created_at timestamptz not null default now(),
      sent_at timestamptz,
      last_error text not null default '',
      primary key (site_id, id),
      unique (site_id, message_id),
      check (num_nonnulls(to_user_id, to_address) = 1),
      foreign key (site_id, to_user_id) references app_user (site_id, id)
    )`.execute(db);
  await sql`
    create index mail_outbox_due on mail_outbox (site_id, next_attempt_at, id) where status = 'queued'`.execute(db);
  await sql`create index mail_outbox_newest on mail_outbox (site_id, created_at, id)`.execute(db);

  // Who did what to which record: ids and names of fields, never their values.
  await sql`
    create table audit_event (
      site_id uuid not null references site (id),
      id uuid not null default gen_random_uuid(),
      at timestamptz not null default now(),
      actor_id uuid not null,
      actor_kind text not null,
      action text not null,
      subject_type text not null,
      subject_id uuid not null,
      fields text[] not null default '{}',
      primary key (site_id, id)
    )`.execute(db);
  await sql`create index audit_event_newest on audit_event (site_id, at, id)`.execute(db);
  await sql`create index audit_event_subject on audit_event (site_id, subject_type, subject_id, at)`.execute(db);
}
