import { type Kysely, sql } from 'kysely';

/** Files of bookings on their way in, and questions for sizes that are on their way to a patient. */
export async function up(db: Kysely<unknown>): Promise<void> {
  // Where a girth's tape went; '' is not known. The tables that sizes are worked out from mean the iliac crest.
  await sql`alter table size_reading add column tape_site text not null default ''`.execute(db);

  await sql`
    create table import_settings (
      site_id uuid not null references site (id),
      data jsonb not null check (jsonb_typeof(data -> 'schemaVersion') = 'number'),
      saved_by uuid not null,
      saved_at timestamptz not null default now(),
      primary key (site_id)
    )`.execute(db);

  await sql`
    create table import_batch (
      site_id uuid not null references site (id),
      id uuid not null default gen_random_uuid(),
      format text not null check (format in ('csv', 'fhir')),
      status text not null default 'staging' check (status in ('staging', 'committed', 'cancelled')),
      created_by uuid not null,
      created_at timestamptz not null default now(),
      committed_at timestamptz,
      created_count integer not null default 0,
      changed_count integer not null default 0,
      same_count integer not null default 0,
      primary key (site_id, id)
    )`.execute(db);
  await sql`create index import_batch_newest on import_batch (site_id, created_at, id)`.execute(db);

  await sql`
    create table import_row (
      site_id uuid not null,
      batch_id uuid not null,
      number integer not null check (number >= 1),
      accession text not null check (length(accession) between 1 and 64),
      scheduled_at timestamptz not null,
      slot_minutes integer not null check (slot_minutes between 1 and 1440),
      scanner_id uuid not null,
      protocol_id uuid not null,
      data jsonb not null check (jsonb_typeof(data -> 'schemaVersion') = 'number'),
      primary key (site_id, batch_id, number),
      unique (site_id, batch_id, accession),
      foreign key (site_id, batch_id) references import_batch (site_id, id),
      foreign key (site_id, scanner_id) references scanner (site_id, id),
      foreign key (site_id, protocol_id) references protocol (site_id, id)
    )`.execute(db);

  // The address is sealed while it is of use, and '' before and after.
  await sql`
    create table size_request (
      site_id uuid not null,
      id uuid not null default gen_random_uuid(),
      booking_id uuid not null,
      token_hash text not null,
      status text not null default 'open' check (status in ('open', 'answered', 'cancelled', 'expired')),
      address_sealed text not null default '',
      address_masked text not null default '',
      expires_at timestamptz not null,
      asked_by uuid not null,
      asked_at timestamptz not null default now(),
      sent_count integer not null default 0,
      last_sent_at timestamptz,
      settled_at timestamptz,
      primary key (site_id, id),
      check (status = 'open' or (address_sealed = '' and address_masked = '' and settled_at is not null)),
      foreign key (site_id, booking_id) references booking (site_id, id),
      foreign key (site_id, asked_by) references app_user (site_id, id)
    )`.execute(db);
  await sql`
    create unique index size_request_open on size_request (site_id, booking_id) where status = 'open'`.execute(db);
  await sql`create index size_request_booking on size_request (site_id, booking_id, asked_at, id)`.execute(db);
  await sql`create index size_request_hash on size_request (token_hash)`.execute(db);
  await sql`create index size_request_expiry on size_request (site_id, expires_at, id) where status = 'open'`.execute(db);

  // A mail for a patient names the request and no address: erasing the address there erases it everywhere.
  await sql`alter table mail_outbox add column to_size_request_id uuid`.execute(db);
  await sql`alter table mail_outbox drop constraint mail_outbox_check`.execute(db);
  await sql`
    alter table mail_outbox
      add constraint mail_outbox_one_receiver check (num_nonnulls(to_user_id, to_address, to_size_request_id) = 1),
      add foreign key (site_id, to_size_request_id) references size_request (site_id, id)`.execute(db);
  await sql`create index mail_outbox_size_request on mail_outbox (site_id, to_size_request_id, created_at)`.execute(db);

  const grants = {
    import_settings: 'select, insert, update (data, saved_by, saved_at)',
    import_batch: 'select, insert, update (status, committed_at, created_count, changed_count, same_count)',
    import_row: 'select, insert',
    size_request: 'select, insert, update (status, address_sealed, address_masked, expires_at, sent_count, last_sent_at, settled_at)',
  };
  for (const [table, rights] of Object.entries(grants)) {
    const name = sql.table(table);
    await sql`alter table ${name} enable row level security`.execute(db);
    await sql`alter table ${name} force row level security`.execute(db);
    await sql`
      create policy site_isolation on ${name}
        using (site_id = nullif(current_setting('app.site_id', true), '')::uuid)
        with check (site_id = nullif(current_setting('app.site_id', true), '')::uuid)`.execute(db);
    await sql`grant ${sql.raw(rights)} on ${name} to selvedge_app`.execute(db);
    if (table !== 'import_settings') await sql`grant select, delete on ${name} to selvedge_retention`.execute(db);
  }
  await sql`grant select, delete on mail_outbox to selvedge_retention`.execute(db);

  await sql`create policy gate_looks_up on size_request for select to selvedge_gate using (true)`.execute(db);
  await sql`grant select (site_id, id, token_hash, status, expires_at) on size_request to selvedge_gate`.execute(db);

  // A function is replaced by a member of the role that owns it; the owner is one for these statements only.
  await sql`do $$ begin execute format('grant selvedge_gate to %I', current_user); end $$`.execute(db);
  await sql`
    create or replace function gate.resolve_token(kind text, hash text)
      returns table (site_id uuid, id uuid, expires_at timestamptz)
      language sql stable strict security definer rows 1 set search_path = pg_catalog, pg_temp
      as $$
        select t.site_id, t.id, t.expires_at
        from public.api_token t
        where resolve_token.kind = 'api' and t.token_hash = resolve_token.hash
          and t.revoked_at is null and t.expires_at > now()
        union all
        select t.site_id, t.id, t.expires_at
        from public.one_time_token t
        where t.kind = resolve_token.kind and t.token_hash = resolve_token.hash
          and t.used_at is null and t.expires_at > now()
        union all
        select r.site_id, r.id, r.expires_at
        from public.size_request r
        where resolve_token.kind = 'size-request' and r.token_hash = resolve_token.hash
          and r.status = 'open' and r.expires_at > now()
      $$`.execute(db);
  await sql`
    create or replace function gate.due_work(kind text, at_most integer)
      returns table (site_id uuid, id uuid)
      language sql stable strict security definer set search_path = pg_catalog, pg_temp
      as $$
        select w.site_id, w.id
        from (
          select m.site_id, m.id, m.next_attempt_at
          from public.mail_outbox m
          where due_work.kind = 'mail' and m.status = 'queued' and m.next_attempt_at <= now()
          union all
          select s.site_id, s.id, s.next_attempt_at
          from public.plan_sheet s
          where due_work.kind = 'plan-sheet' and s.status = 'queued' and s.next_attempt_at <= now()
          union all
          select b.site_id, b.booking_id, b.recheck_at
          from public.booking_state b
          where due_work.kind = 'pre-check' and b.stale = 1 and b.recheck_at <= now()
          union all
          select r.site_id, r.id, r.expires_at
          from public.size_request r
          where due_work.kind = 'size-request-expiry' and r.status = 'open' and r.expires_at <= now()
        ) w
        order by w.next_attempt_at, w.id
        limit least(greatest(at_most, 0), 1000)
      $$`.execute(db);
  await sql`do $$ begin execute format('revoke selvedge_gate from %I', current_user); end $$`.execute(db);
}
