import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import type { ImportRow } from '@/lib/domain/import';
import { spreadOf } from '@/lib/domain/import';

/** A reading as a row keeps it, short: a file has many. */
const toStored = (reading: ImportRow['readings'][number]) => ({
  quantity: reading.quantity,
  value: reading.value,
  source: reading.source,
  spread: spreadOf(reading),
  taken_on: reading.takenOn ?? '',
  tape_site: reading.tapeSite ?? '',
});

/**
 * Adds rows from arrays (COPY is refused under row-level security). A row that is there already stays as it is, so a
 * piece that is sent again adds nothing.
 */
export async function insertImportRows(trx: SiteTransaction, siteId: string, batchId: string, rows: readonly ImportRow[]): Promise<void> {
  const column = <T>(read: (row: ImportRow) => T) => rows.map(read);
  await sql`
    insert into import_row (site_id, batch_id, number, accession, scheduled_at, slot_minutes, scanner_id, protocol_id, data)
    select ${siteId}::uuid, ${batchId}::uuid, r.*
    from unnest(
      ${column((row) => row.number)}::integer[], ${column((row) => row.accession)}::text[],
      ${column((row) => row.scheduledAt)}::timestamptz[], ${column((row) => row.slotMinutes)}::integer[],
      ${column((row) => row.scannerId)}::uuid[], ${column((row) => row.protocolId)}::uuid[],
      ${column((row) => JSON.stringify({ schemaVersion: 1, readings: row.readings.map(toStored) }))}::jsonb[]
    ) r
    on conflict do nothing`.execute(trx);
}

export interface ComparedRow {
  readonly number: number;
  /** False: its accession number stands in an earlier row of the same import. */
  readonly staged: boolean;
  readonly known: boolean;
  readonly moved: boolean;
  readonly retimed: boolean;
  readonly reslotted: boolean;
  readonly reprotocolled: boolean;
  readonly newReadings: number;
}

/** A reading counts as known when the booking has the same value of the same day; a file without days adds a value once. */
const KNOWN_READING = sql`
  exists (
    select from size_reading s
    where s.site_id = b.site_id and s.booking_id = b.id and s.quantity = q.quantity and s.value = q.value
      and (q.taken_on = '' or s.taken_on = q.taken_on))`;

const READINGS = sql`jsonb_to_recordset(i.data -> 'readings') as q(
  quantity text, value float8, source text, spread float8, taken_on text, tape_site text)`;

/** What the rows of one piece would do, compared with the bookings of this moment. */
export async function compareImportRows(trx: SiteTransaction, siteId: string, batchId: string, numbers: readonly number[]): Promise<ComparedRow[]> {
  const { rows } = await sql<ComparedRow>`
    select n.number, i.number is not null as staged, b.id is not null as known,
      coalesce(b.booked_scanner_id <> i.scanner_id, false) as moved,
      coalesce(b.scheduled_at <> i.scheduled_at, false) as retimed,
      coalesce(b.slot_minutes <> i.slot_minutes, false) as reslotted,
      coalesce(b.protocol_id <> i.protocol_id, false) as reprotocolled,
      case when i.number is null then 0 else (
        select count(*)::integer from ${READINGS} where b.id is null or not ${KNOWN_READING}
      ) end as "newReadings"
    from unnest(${[...numbers]}::integer[]) n(number)
    left join import_row i on i.site_id = ${siteId} and i.batch_id = ${batchId} and i.number = n.number
    left join booking b on b.site_id = i.site_id and b.accession = i.accession
    order by n.number`.execute(trx);
  return rows;
}

export async function countImportRows(trx: SiteTransaction, siteId: string, batchId: string): Promise<number> {
  const { total } = await trx
    .selectFrom('import_row')
    .select((eb) => eb.fn.countAll<string>().as('total'))
    .where('site_id', '=', siteId)
    .where('batch_id', '=', batchId)
    .executeTakeFirstOrThrow();
  return Number(total);
}

export interface Committed {
  readonly created: number;
  readonly changed: number;
  readonly same: number;
}

interface Commit {
  readonly siteId: string;
  readonly batchId: string;
  readonly source: 'import' | 'api';
  readonly by: string;
  readonly actor: { readonly kind: string; readonly id: string };
  readonly at: Date;
}

/**
 * Every row of an import at once: bookings made or changed, readings added, lists told that their answer is stale, and
 * the audit log, each one statement for all rows. What is touched is kept in a table of the transaction's own.
 */
export async function commitImportRows(trx: SiteTransaction, commit: Commit): Promise<Committed> {
  const { siteId, batchId, at } = commit;
  const today = at.toISOString().slice(0, 10);
  // Against a booking typed or imported at the same moment: whoever is second sees the first one's.
  await sql`select pg_advisory_xact_lock(hashtextextended('import ' || ${siteId}::text, 0))`.execute(trx);
  await sql`
    create temporary table touched (booking_id uuid primary key, fields text[] not null, made boolean not null)
    on commit drop`.execute(trx);
  await sql`
    with made as (
      insert into booking (site_id, accession, scheduled_at, slot_minutes, body_region, booked_scanner_id, protocol_id, source)
      select i.site_id, i.accession, i.scheduled_at, i.slot_minutes, p.region, i.scanner_id, i.protocol_id, ${commit.source}
      from import_row i
      join protocol p on p.site_id = i.site_id and p.id = i.protocol_id
      where i.site_id = ${siteId} and i.batch_id = ${batchId}
        and not exists (select from booking b where b.site_id = i.site_id and b.accession = i.accession)
      on conflict (site_id, accession) do nothing
      returning id)
    insert into touched select id, '{created}', true from made`.execute(trx);
  await sql`
    insert into booking_state (site_id, booking_id, changed_at)
    select ${siteId}::uuid, booking_id, ${at} from touched`.execute(trx);
  await sql`
    with wanted as (
      select b.id, i.scanner_id, i.protocol_id, i.scheduled_at, i.slot_minutes, p.region,
        array_remove(array[
          case when b.booked_scanner_id <> i.scanner_id then 'scanner' end,
          case when b.scheduled_at <> i.scheduled_at then 'scheduledAt' end,
          case when b.slot_minutes <> i.slot_minutes then 'slotMinutes' end,
          case when b.protocol_id <> i.protocol_id then 'protocol' end], null) as fields
      from import_row i
      join booking b on b.site_id = i.site_id and b.accession = i.accession
      join protocol p on p.site_id = i.site_id and p.id = i.protocol_id
      where i.site_id = ${siteId} and i.batch_id = ${batchId}
        and (b.booked_scanner_id, b.scheduled_at, b.slot_minutes, b.protocol_id)
          is distinct from (i.scanner_id, i.scheduled_at, i.slot_minutes, i.protocol_id)
    ), changed as (
      update booking b
      set booked_scanner_id = w.scanner_id, scheduled_at = w.scheduled_at, slot_minutes = w.slot_minutes,
        protocol_id = w.protocol_id, body_region = w.region, version = b.version + 1
      from wanted w where b.site_id = ${siteId} and b.id = w.id
      returning b.id, w.fields)
    insert into touched select id, fields, false from changed`.execute(trx);
  await sql`
    with added as (
      insert into size_reading (site_id, booking_id, quantity, value, source, spread, taken_on, tape_site, recorded_by, recorded_at)
      select b.site_id, b.id, q.quantity, q.value, q.source, q.spread, coalesce(nullif(q.taken_on, ''), ${today}), q.tape_site,
        ${commit.by}::uuid, ${at}::timestamptz
      from import_row i
      join booking b on b.site_id = i.site_id and b.accession = i.accession
      cross join ${READINGS}
      where i.site_id = ${siteId} and i.batch_id = ${batchId} and not ${KNOWN_READING}
      returning booking_id, quantity)
    insert into touched
    select booking_id, array_agg(quantity order by quantity), false from added group by booking_id
    on conflict (booking_id) do update set fields = touched.fields || excluded.fields`.execute(trx);
  await sql`
    update booking_state s set stale = 1, recheck_at = ${at}, changed_at = ${at}, version = s.version + 1
    from touched t where s.site_id = ${siteId} and s.booking_id = t.booking_id and not t.made`.execute(trx);
  // A move that was proposed here and is now what is booked is settled by that.
  await sql`
    update move_proposal m set status = 'agreed', settled_at = ${at}
    from touched t, booking b
    where m.site_id = ${siteId} and m.booking_id = t.booking_id and m.status = 'open'
      and b.site_id = m.site_id and b.id = m.booking_id
      and (b.booked_scanner_id, b.scheduled_at, b.slot_minutes) is not distinct from (m.scanner_id, m.scheduled_at, m.slot_minutes)`.execute(trx);
  await sql`
    insert into audit_event (site_id, actor_id, actor_kind, action, subject_type, subject_id, fields)
    select ${siteId}::uuid, ${commit.actor.id}::uuid, ${commit.actor.kind}, 'booking.import', 'booking', booking_id, fields
    from touched`.execute(trx);
  const { rows } = await sql<{ created: number; changed: number }>`
    select count(*) filter (where made)::integer as created, count(*) filter (where not made)::integer as changed
    from touched`.execute(trx);
  const { created, changed } = rows[0]!;
  return { created, changed, same: (await countImportRows(trx, siteId, batchId)) - created - changed };
}
