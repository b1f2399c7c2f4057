import { type Kysely, sql } from 'kysely';

/** `data` is the versioned document; its `schemaVersion` tells which upcast an old one needs. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table scanner (
      site_id uuid not null references site (id),
      id uuid not null default gen_random_uuid(),
      name text not null check (length(name) between 1 and 200),
      current_version integer not null default 1,
      archived_at timestamptz,
      created_at timestamptz not null default now(),
      version integer not null default 1,
      primary key (site_id, id),
      unique (site_id, name)
    )`.execute(db);
  await sql`
    create table scanner_version (
      site_id uuid not null,
      scanner_id uuid not null,
      version integer not null check (version >= 1),
      data jsonb not null check (jsonb_typeof(data -> 'schemaVersion') = 'number'),
      created_by uuid not null,
      created_at timestamptz not null default now(),
      primary key (site_id, scanner_id, version),
      foreign key (site_id, scanner_id) references scanner (site_id, id)
    )`.execute(db);

  await sql`
    create table protocol (
      site_id uuid not null references site (id),
      id uuid not null default gen_random_uuid(),
      name text not null check (length(name) between 1 and 200),
      region text not null,
      current_version integer not null default 1,
      archived_at timestamptz,
      created_at timestamptz not null default now(),
      version integer not null default 1,
      primary key (site_id, id),
      unique (site_id, name)
    )`.execute(db);
  await sql`
    create table protocol_version (
      site_id uuid not null,
      protocol_id uuid not null,
      version integer not null check (version >= 1),
      data jsonb not null check (jsonb_typeof(data -> 'schemaVersion') = 'number'),
      created_by uuid not null,
      created_at timestamptz not null default now(),
      primary key (site_id, protocol_id, version),
      foreign key (site_id, protocol_id) references protocol (site_id, id)
    )`.execute(db);
  await sql`
    create table sequence (
      site_id uuid not null,
      protocol_id uuid not null,
      protocol_version integer not null,
      position integer not null check (position >= 0),
      id uuid not null default gen_random_uuid(),
      name text not null check (length(name) between 1 and 200),
      family text not null,
      data jsonb not null check (jsonb_typeof(data -> 'schemaVersion') = 'number'),
      primary key (site_id, protocol_id, protocol_version, position),
      unique (site_id, protocol_id, protocol_version, id),
      foreign key (site_id, protocol_id, protocol_version)
        references protocol_version (site_id, protocol_id, version)
    )`.execute(db);

  await sql`
    create table site_policy (
      site_id uuid not null references site (id),
      version integer not null check (version >= 1),
      data jsonb not null check (jsonb_typeof(data -> 'schemaVersion') = 'number'),
      created_by uuid not null,
      created_at timestamptz not null default now(),
      primary key (site_id, version)
    )`.execute(db);
}
