import { type Kysely, sql } from 'kysely';

/**
 * What a radiologist asks to be kept free of fold, per booking (only added to, the newest counts), and plan sheets as
 * files: made by the worker, so each has a place to wait in.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table keep_clear_request (
      site_id uuid not null,
      id uuid not null default gen_random_uuid(),
      booking_id uuid not null,
      data jsonb not null check (jsonb_typeof(data -> 'schemaVersion') = 'number'),
      requested_by uuid not null,
      requested_at timestamptz not null default now(),
      primary key (site_id, id),
      foreign key (site_id, booking_id) references booking (site_id, id),
      foreign key (site_id, requested_by) references app_user (site_id, id)
    )`.execute(db);
  await sql`
    create index keep_clear_request_booking on keep_clear_request (site_id, booking_id, requested_at)`.execute(db);

  // One file for one content: the same sheet asked for twice is the same row. A page of text and lines is some 60 kB.
  await sql`
    create table plan_sheet (
      site_id uuid not null,
      id uuid not null default gen_random_uuid(),
      plan_id uuid not null,
      plan_version integer not null,
      paper text not null check (paper in ('A4', 'Letter')),
      content_hash text not null check (length(content_hash) = 64),
      status text not null default 'queued' check (status in ('queued', 'done', 'failed')),
      attempts integer not null default 0,
      next_attempt_at timestamptz not null default now(),
      bytes bytea check (octet_length(bytes) <= 1048576),
      requested_by uuid not null,
      requested_at timestamptz not null default now(),
      finished_at timestamptz,
      last_error text not null default '',
      primary key (site_id, id),
      unique (site_id, plan_id, plan_version, paper, content_hash),
      check ((status = 'done') = (bytes is not null)),
      foreign key (site_id, plan_id, plan_version) references plan_version (site_id, plan_id, version)
    )`.execute(db);
  await sql`
    create index plan_sheet_due on plan_sheet (site_id, next_attempt_at, id) where status = 'queued'`.execute(db);

  const grants = {
    keep_clear_request: 'select, insert',
    plan_sheet: 'select, insert, update (status, attempts, next_attempt_at, bytes, finished_at, last_error)',
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
    await sql`grant select, delete on ${name} to selvedge_retention`.execute(db);
  }

  await sql`create policy gate_looks_up on plan_sheet for select to selvedge_gate using (true)`.execute(db);
  await sql`grant select (site_id, id, status, next_attempt_at) on plan_sheet to selvedge_gate`.execute(db);

  // A function is replaced by a member of the role that owns it; the owner is one for these statements only.
  await sql`do $$ begin execute format('grant selvedge_gate to %I', current_user); end $$`.execute(db);
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
        ) w
        order by w.next_attempt_at, w.id
        limit least(greatest(at_most, 0), 1000)
      $$`.execute(db);
  await sql`do $$ begin execute format('revoke selvedge_gate from %I', current_user); end $$`.execute(db);
}
