import { type Kysely, sql } from 'kysely';

/** Demonstrations: ordered scenes, and the links through which people without an account look at them. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table demonstration (
      site_id uuid not null references site (id),
      id uuid not null default gen_random_uuid(),
      title text not null check (length(title) between 1 and 120),
      version integer not null default 1 check (version >= 1),
      created_by uuid not null,
      created_at timestamptz not null default now(),
      changed_at timestamptz not null default now(),
      primary key (site_id, id),
      foreign key (site_id, created_by) references app_user (site_id, id)
    )`.execute(db);
  await sql`create index demonstration_newest on demonstration (site_id, changed_at, id)`.execute(db);

  // A scene taken out keeps its row: the application deletes nothing.
  await sql`
    create table scene (
      site_id uuid not null,
      id uuid not null,
      demonstration_id uuid not null,
      position integer not null check (position >= 0),
      removed integer not null default 0 check (removed in (0, 1)),
      data jsonb not null check (jsonb_typeof(data -> 'schemaVersion') = 'number'),
      primary key (site_id, id),
      foreign key (site_id, demonstration_id) references demonstration (site_id, id)
    )`.execute(db);
  await sql`create index scene_order on scene (site_id, demonstration_id, removed, position, id)`.execute(db);

  await sql`
    create table demonstration_share (
      site_id uuid not null,
      id uuid not null default gen_random_uuid(),
      demonstration_id uuid not null,
      token_hash text not null,
      expires_at timestamptz not null,
      revoked_at timestamptz,
      openings integer not null default 0 check (openings >= 0),
      last_opened_at timestamptz,
      created_by uuid not null,
      created_at timestamptz not null default now(),
      primary key (site_id, id),
      foreign key (site_id, demonstration_id) references demonstration (site_id, id),
      foreign key (site_id, created_by) references app_user (site_id, id)
    )`.execute(db);
  await sql`
    create index demonstration_share_newest on demonstration_share (site_id, demonstration_id, created_at, id)`.execute(db);
  // Serves the gate, which does not know the site yet.
  await sql`create index demonstration_share_hash on demonstration_share (token_hash)`.execute(db);

  const grants = {
    demonstration: 'select, insert, update (title, version, changed_at)',
    scene: 'select, insert, update (position, removed, data)',
    demonstration_share: 'select, insert, update (revoked_at, openings, last_opened_at)',
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
  }

  await sql`create policy gate_looks_up on demonstration_share for select to selvedge_gate using (true)`.execute(db);
  await sql`
    grant select (site_id, id, token_hash, expires_at, revoked_at) on demonstration_share to selvedge_gate`.execute(db);

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
        union all
        select s.site_id, s.id, s.expires_at
        from public.demonstration_share s
        where resolve_token.kind = 'demonstration-share' and s.token_hash = resolve_token.hash
          and s.revoked_at is null and s.expires_at > now()
      $$`.execute(db);
  await sql`do $$ begin execute format('revoke selvedge_gate from %I', current_user); end $$`.execute(db);
}
