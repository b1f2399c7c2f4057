import { type Kysely, sql } from 'kysely';

/** A demonstration can be put away, and be handed out as a file that the worker makes. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`alter table demonstration add column put_away integer not null default 0 check (put_away in (0, 1))`.execute(db);
  await sql`grant update (put_away) on demonstration to selvedge_app`.execute(db);
  await sql`drop index demonstration_newest`.execute(db);
  await sql`create index demonstration_newest on demonstration (site_id, put_away, changed_at, id)`.execute(db);

  // One file for one content: the same hand-out asked for twice is the same row. A page of lines and a grey picture is
  // some 60 kB, and a demonstration has up to 40 scenes.
  await sql`
    create table demonstration_hand_out (
      site_id uuid not null,
      id uuid not null default gen_random_uuid(),
      demonstration_id uuid not null,
      paper text not null check (paper in ('A4', 'Letter')),
      content_hash text not null check (length(content_hash) = 64),
      status text not null default 'queued' check (status in ('queued', 'done', 'failed')),
      attempts integer not null default 0,
      next_attempt_at timestamptz not null default now(),
      bytes bytea check (octet_length(bytes) <= 8388608),
      requested_by uuid not null,
      requested_at timestamptz not null default now(),
      finished_at timestamptz,
      last_error text not null default '',
      primary key (site_id, id),
      unique (site_id, demonstration_id, paper, content_hash),
      check ((status = 'done') = (bytes is not null)),
      foreign key (site_id, demonstration_id) references demonstration (site_id, id),
      foreign key (site_id, requested_by) references app_user (site_id, id)
    )`.execute(db);
  await sql`
    create index demonstration_hand_out_due on demonstration_hand_out (site_id, next_attempt_at, id)
      where status = 'queued'`.execute(db);
  await sql`alter table demonstration_hand_out enable row level security`.execute(db);
  await sql`alter table demonstration_hand_out force row level security`.execute(db);
  await sql`
    create policy site_isolation on demonstration_hand_out
      using (site_id = nullif(current_setting('app.site_id', true), '')::uuid)
      with check (site_id = nullif(current_setting('app.site_id', true), '')::uuid)`.execute(db);
  await sql`
    grant select, insert, update (status, attempts, next_attempt_at, bytes, finished_at, last_error)
      on demonstration_hand_out to selvedge_app`.execute(db);

  await sql`create policy gate_looks_up on demonstration_hand_out for select to selvedge_gate using (true)`.execute(db);
  await sql`grant select (site_id, id, status, next_attempt_at) on demonstration_hand_out to selvedge_gate`.execute(db);

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
          select h.site_id, h.id, h.next_attempt_at
          from public.demonstration_hand_out h
          where due_work.kind = 'hand-out' and h.status = 'queued' and h.next_attempt_at <= now()
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
