import { type Kysely, sql } from 'kysely';

export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table site (
      id uuid primary key,
      name text not null check (length(name) between 1 and 200),
      accession_pattern text not null,
      created_at timestamptz not null default now()
    )`.execute(db);

  await sql`
    create table app_user (
      site_id uuid not null references site (id),
      id uuid not null default gen_random_uuid(),
      email text not null check (length(email) between 3 and 320),
      display_name text not null check (length(display_name) between 1 and 200),
      roles text[] not null,
      password_hash text,
      session_epoch integer not null default 1,
      disabled_at timestamptz,
      created_at timestamptz not null default now(),
      version integer not null default 1,
      primary key (site_id, id)
    )`.execute(db);
  await sql`create unique index app_user_email on app_user (site_id, email)`.execute(db);

  // Links that work once without a session: the hash alone is kept.
  await sql`
    create table one_time_token (
      site_id uuid not null references site (id),
      id uuid not null default gen_random_uuid(),
      kind text not null,
      token_hash text not null,
      user_id uuid not null,
      expires_at timestamptz not null,
      used_at timestamptz,
      created_at timestamptz not null default now(),
      primary key (site_id, id),
      unique (site_id, kind, token_hash),
      foreign key (site_id, user_id) references app_user (site_id, id)
    )`.execute(db);
  await sql`create index one_time_token_user on one_time_token (site_id, user_id)`.execute(db);

  await sql`
    create table api_token (
      site_id uuid not null references site (id),
      id uuid not null default gen_random_uuid(),
      name text not null check (length(name) between 1 and 200),
      token_hash text not null,
      scopes text[] not null,
      expires_at timestamptz not null,
      revoked_at timestamptz,
      created_by uuid not null,
      created_at timestamptz not null default now(),
      primary key (site_id, id),
      unique (site_id, token_hash),
      foreign key (site_id, created_by) references app_user (site_id, id)
    )`.execute(db);

  // An address belongs to one site only. Kept by a trigger on app_user; nobody but the gate reads or writes it.
  await sql`
    create table gate.sign_in_identity (
      site_id uuid not null,
      user_id uuid not null,
      email_normalised text not null unique,
      primary key (site_id, user_id),
      foreign key (site_id, user_id) references public.app_user (site_id, id) on delete cascade
    )`.execute(db);

  // Counts tries by a hash of the address or of the network origin, so that no address can be read back from it.
  await sql`
    create table gate.sign_in_attempt (
      key_hash text primary key,
      tries integer not null,
      last_try_at timestamptz not null,
      blocked_until timestamptz not null
    )`.execute(db);
}
