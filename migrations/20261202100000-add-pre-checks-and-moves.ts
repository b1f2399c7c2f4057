import { type Kysely, sql } from 'kysely';

/**
 * The coordinator's day: what each check of a booking came to (only added to, the newest counts), when a scanner is
 * staffed, moves that are proposed, and what was written on a booking.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  // Readings taken before an operation that changes the body's size count no more; '' is none.
  await sql`
    alter table booking
      add column surgery_on text not null default ''
        check (surgery_on = '' or surgery_on ~ '^[0-9]{4}-[0-9]{2}-[0-9]{2}$')`.execute(db);

  // What lists sort and filter by, and whether the last check still stands. Rows that are here already wait for theirs.
  await sql`
    alter table booking_state
      add column result_rank integer not null default 0,
      add column minutes_over float8 not null default 0,
      add column check_number integer not null default 0,
      add column next_kind text not null default '',
      add column next_text text not null default '',
      add column stale integer not null default 1 check (stale in (0, 1)),
      add column recheck_at timestamptz not null default now(),
      add column escalation text not null default '' check (escalation in ('', 'open', 'decided'))`.execute(db);
  await sql`
    create index booking_state_stale on booking_state (site_id, recheck_at, booking_id) where stale = 1`.execute(db);

  await sql`
    create table check_result (
      site_id uuid not null,
      booking_id uuid not null,
      number integer not null check (number >= 1),
      result text not null,
      data jsonb not null check (jsonb_typeof(data -> 'schemaVersion') = 'number'),
      engine_version text not null,
      policy_version integer not null,
      input_hash text not null,
      checked_at timestamptz not null default now(),
      primary key (site_id, booking_id, number),
      foreign key (site_id, booking_id) references booking (site_id, id)
    )`.execute(db);
  await sql`create index check_result_time on check_result (site_id, booking_id, checked_at)`.execute(db);

  await sql`
    create table scanner_session (
      site_id uuid not null,
      id uuid not null default gen_random_uuid(),
      scanner_id uuid not null,
      starts_at timestamptz not null,
      ends_at timestamptz not null check (ends_at > starts_at and ends_at <= starts_at + interval '24 hours'),
      status text not null default 'open' check (status in ('open', 'removed')),
      created_by uuid not null,
      created_at timestamptz not null default now(),
      primary key (site_id, id),
      foreign key (site_id, scanner_id) references scanner (site_id, id),
      foreign key (site_id, created_by) references app_user (site_id, id)
    )`.execute(db);
  await sql`
    create index scanner_session_time on scanner_session (site_id, starts_at, scanner_id)`.execute(db);

  // What was booked when the move was proposed is kept, so that both can be shown side by side.
  await sql`
    create table move_proposal (
      site_id uuid not null,
      id uuid not null default gen_random_uuid(),
      booking_id uuid not null,
      status text not null default 'open' check (status in ('open', 'agreed', 'withdrawn', 'replaced')),
      scanner_id uuid not null,
      scheduled_at timestamptz not null,
      slot_minutes integer not null check (slot_minutes between 1 and 1440),
      booked_scanner_id uuid not null,
      booked_at timestamptz not null,
      booked_slot_minutes integer not null,
      reason text not null default '' check (length(reason) <= 2000),
      proposed_by uuid not null,
      proposed_at timestamptz not null default now(),
      settled_at timestamptz,
      primary key (site_id, id),
      check ((status = 'open') = (settled_at is null)),
      foreign key (site_id, booking_id) references booking (site_id, id),
      foreign key (site_id, scanner_id) references scanner (site_id, id),
      foreign key (site_id, proposed_by) references app_user (site_id, id)
    )`.execute(db);
  await sql`
    create unique index move_proposal_open on move_proposal (site_id, booking_id) where status = 'open'`.execute(db);
  await sql`
    create index move_proposal_status on move_proposal (site_id, status, proposed_at, id)`.execute(db);
  await sql`
    create index move_proposal_room on move_proposal (site_id, scanner_id, scheduled_at) where status = 'open'`.execute(db);

  await sql`
    create table booking_entry (
      site_id uuid not null,
      id uuid not null default gen_random_uuid(),
      booking_id uuid not null,
      kind text not null,
      note text not null default '' check (length(note) <= 2000),
      data jsonb not null check (jsonb_typeof(data -> 'schemaVersion') = 'number'),
      actor_kind text not null,
      actor_id uuid not null,
      written_at timestamptz not null default now(),
      primary key (site_id, id),
      foreign key (site_id, booking_id) references booking (site_id, id)
    )`.execute(db);
  await sql`
    create index booking_entry_time on booking_entry (site_id, booking_id, written_at, id)`.execute(db);

  const grants = {
    check_result: 'select, insert',
    scanner_session: 'select, insert, update (status)',
    move_proposal: 'select, insert, update (status, settled_at)',
    booking_entry: 'select, insert',
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
    if (table !== 'scanner_session') {
      await sql`grant select, delete on ${name} to selvedge_retention`.execute(db);
    }
  }

  await sql`create policy gate_looks_up on booking_state for select to selvedge_gate using (true)`.execute(db);
  await sql`grant select (site_id, booking_id, stale, recheck_at) on booking_state to selvedge_gate`.execute(db);

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
          union all
          select b.site_id, b.booking_id, b.recheck_at
          from public.booking_state b
          where due_work.kind = 'pre-check' and b.stale = 1 and b.recheck_at <= now()
        ) w
        order by w.next_attempt_at, w.id
        limit least(greatest(at_most, 0), 1000)
      $$`.execute(db);
  await sql`do $$ begin execute format('revoke selvedge_gate from %I', current_user); end $$`.execute(db);
}
