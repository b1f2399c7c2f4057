import { type Kysely, sql } from 'kysely';

export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table booking (
      site_id uuid not null references site (id),
      id uuid not null default gen_random_uuid(),
      accession text not null check (length(accession) between 1 and 64),
      booked_scanner_id uuid not null,
      protocol_id uuid not null,
      body_region text not null,
      scheduled_at timestamptz not null,
      slot_minutes integer not null check (slot_minutes between 1 and 1440),
      source text not null,
      created_at timestamptz not null default now(),
      version integer not null default 1,
      primary key (site_id, id),
      unique (site_id, accession),
      foreign key (site_id, booked_scanner_id) references scanner (site_id, id),
      foreign key (site_id, protocol_id) references protocol (site_id, id)
    )`.execute(db);
  await sql`create index booking_time on booking (site_id, scheduled_at, id)`.execute(db);
  await sql`create index booking_scanner_time on booking (site_id, booked_scanner_id, scheduled_at)`.execute(db);
  await sql`create index booking_protocol on booking (site_id, protocol_id)`.execute(db);

  // What lists read: one row a booking, rewritten in the transaction of every change to it.
  await sql`
    create table booking_state (
      site_id uuid not null,
      booking_id uuid not null,
      verdict_worst text not null default '',
      plan_state text not null default '',
      result text not null default '',
      minutes_needed float8 not null default 0,
      changed_at timestamptz not null default now(),
      version integer not null default 1,
      primary key (site_id, booking_id),
      foreign key (site_id, booking_id) references booking (site_id, id)
    )`.execute(db);
  await sql`create index booking_state_result on booking_state (site_id, result, booking_id)`.execute(db);
  await sql`create index booking_state_changed on booking_state (site_id, changed_at, booking_id)`.execute(db);

  await sql`
    create table size_reading (
      site_id uuid not null,
      id uuid not null default gen_random_uuid(),
      booking_id uuid not null,
      quantity text not null,
      value float8 not null check (value = value and value >= 0 and value < 1e6),
      source text not null,
      spread float8 not null default 0 check (spread = spread and spread >= 0 and spread < 1e6),
      taken_on text not null check (taken_on ~ '^[0-9]{4}-[0-9]{2}-[0-9]{2}$'),
      recorded_by uuid not null,
      recorded_at timestamptz not null default now(),
      primary key (site_id, id),
      foreign key (site_id, booking_id) references booking (site_id, id)
    )`.execute(db);
  await sql`
    create index size_reading_newest
      on size_reading (site_id, booking_id, quantity, recorded_at desc, id)`.execute(db);

  // What is left of a booking after retention: that it was here, and when it went.
  await sql`
    create table booking_tombstone (
      site_id uuid not null references site (id),
      booking_id uuid not null,
      deleted_at timestamptz not null default now(),
      reason text not null,
      primary key (site_id, booking_id)
    )`.execute(db);
}
