import { type Kysely, sql } from 'kysely';

export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table plan (
      site_id uuid not null references site (id),
      id uuid not null default gen_random_uuid(),
      booking_id uuid,
      state text not null default 'draft' check (state in ('draft', 'for use', 'signed off', 'used')),
      current_version integer not null default 1,
      short_code text not null check (length(short_code) between 4 and 16),
      created_at timestamptz not null default now(),
      primary key (site_id, id),
      unique (site_id, short_code),
      foreign key (site_id, booking_id) references booking (site_id, id)
    )`.execute(db);
  await sql`create index plan_booking on plan (site_id, booking_id, created_at)`.execute(db);

  await sql`
    create table plan_version (
      site_id uuid not null,
      plan_id uuid not null,
      version integer not null check (version >= 1),
      data jsonb not null check (jsonb_typeof(data -> 'schemaVersion') = 'number'),
      result jsonb not null check (jsonb_typeof(result -> 'schemaVersion') = 'number'),
      engine_version text not null,
      policy_version integer not null,
      input_hash text not null,
      idempotency_key text not null check (length(idempotency_key) between 8 and 128),
      note text not null default '' check (length(note) <= 2000),
      created_by uuid not null,
      created_at timestamptz not null default now(),
      primary key (site_id, plan_id, version),
      unique (site_id, plan_id, idempotency_key),
      foreign key (site_id, plan_id) references plan (site_id, id)
    )`.execute(db);

  await sql`
    create table sign_off (
      site_id uuid not null,
      id uuid not null default gen_random_uuid(),
      plan_id uuid not null,
      plan_version integer not null,
      decision text not null check (decision in ('signed off', 'sent back')),
      reason text not null default '' check (length(reason) <= 2000),
      signed_by uuid not null,
      signed_at timestamptz not null default now(),
      primary key (site_id, id),
      foreign key (site_id, plan_id, plan_version) references plan_version (site_id, plan_id, version),
      foreign key (site_id, signed_by) references app_user (site_id, id)
    )`.execute(db);
  await sql`create index sign_off_plan on sign_off (site_id, plan_id, signed_at)`.execute(db);

  await sql`
    create table outcome (
      site_id uuid not null,
      id uuid not null default gen_random_uuid(),
      plan_id uuid not null,
      plan_version integer not null,
      wrap text not null check (wrap in ('none', 'outside', 'inside')),
      data jsonb not null check (jsonb_typeof(data -> 'schemaVersion') = 'number'),
      recorded_by uuid not null,
      recorded_at timestamptz not null default now(),
      primary key (site_id, id),
      foreign key (site_id, plan_id, plan_version) references plan_version (site_id, plan_id, version)
    )`.execute(db);
  await sql`create index outcome_plan on outcome (site_id, plan_id, recorded_at)`.execute(db);
}
