import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import type { ImportRow } from '@/lib/domain/import';
import { settleAgreedMoves } from '@/db/queries/move-proposal/move-proposals';
import { spreadOf } from '@/lib/domain/import';
import { localDay } from '@/lib/domain/site/local-day';

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

/** From here on reading each table once beats looking every row up. */
const MANY_ROWS = 1000;

interface Commit {
  readonly siteId: string;
  readonly batchId: string;
  readonly source: 'import' | 'api';
  readonly by: string;
  readonly actor: { readonly kind: string; readonly id: string };
  readonly at: Date;
}

/** What an import did to one booking. */
interface Touched {
  readonly made: boolean;
  readonly fields: readonly string[];
  /** Where and when it was booked before and is now, as its history writes it; absent while that is the same. */
  readonly place?: string;
}

async function makeBookings(trx: SiteTransaction, { siteId, batchId, source, at }: Commit, touched: Map<string, Touched>): Promise<void> {
  const { rows } = await sql<{ id: string }>`
    insert into booking (site_id, accession, scheduled_at, slot_minutes, body_region, booked_scanner_id, protocol_id, source)
    select i.site_id, i.accession, i.scheduled_at, i.slot_minutes, p.region, i.scanner_id, i.protocol_id, ${source}
    from import_row i
    join protocol p on p.site_id = i.site_id and p.id = i.protocol_id
    where i.site_id = ${siteId} and i.batch_id = ${batchId}
      and not exists (select from booking b where b.site_id = i.site_id and b.accession = i.accession)
    on conflict (site_id, accession) do nothing
    returning id`.execute(trx);
  const made = rows.map(({ id }) => id);
  for (const id of made) touched.set(id, { made: true, fields: ['created'] });
  await sql`
    insert into booking_state (site_id, booking_id, changed_at)
    select ${siteId}::uuid, id, ${at}::timestamptz from unnest(${made}::uuid[]) id`.execute(trx);
}

const ISO = 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"';
const placeOf = (scanner: string, booked: string) => sql`jsonb_build_object(
  'scanner', ${sql.ref(`${scanner}.name`)}, 'at', to_char(${sql.ref(`${booked}.scheduled_at`)} at time zone 'UTC', ${ISO}),
  'slotMinutes', ${sql.ref(`${booked}.slot_minutes`)})`;

async function changeBookings(trx: SiteTransaction, { siteId, batchId }: Commit, touched: Map<string, Touched>): Promise<void> {
  const { rows } = await sql<{ id: string; fields: string[]; place: string }>`
    update booking b
    set booked_scanner_id = w.scanner_id, scheduled_at = w.scheduled_at, slot_minutes = w.slot_minutes,
      protocol_id = w.protocol_id, body_region = w.region, version = b.version + 1
    from (
      select o.id, i.scanner_id, i.protocol_id, i.scheduled_at, i.slot_minutes, p.region,
        jsonb_build_object('schemaVersion', 1, 'from', ${placeOf('was', 'o')}, 'to', ${placeOf('becomes', 'i')})::text as place,
        array_remove(array[
          case when o.booked_scanner_id <> i.scanner_id then 'scanner' end,
          case when o.scheduled_at <> i.scheduled_at then 'scheduledAt' end,
          case when o.slot_minutes <> i.slot_minutes then 'slotMinutes' end,
          case when o.protocol_id <> i.protocol_id then 'protocol' end], null) as fields
      from import_row i
      join booking o on o.site_id = i.site_id and o.accession = i.accession
      join protocol p on p.site_id = i.site_id and p.id = i.protocol_id
      join scanner was on was.site_id = o.site_id and was.id = o.booked_scanner_id
      join scanner becomes on becomes.site_id = i.site_id and becomes.id = i.scanner_id
      where i.site_id = ${siteId} and i.batch_id = ${batchId}
        and (o.booked_scanner_id, o.scheduled_at, o.slot_minutes, o.protocol_id)
          is distinct from (i.scanner_id, i.scheduled_at, i.slot_minutes, i.protocol_id)
    ) w
    where b.site_id = ${siteId} and b.id = w.id
    returning b.id, w.fields, w.place`.execute(trx);
  for (const { id, fields, place } of rows) {
    touched.set(id, { made: false, fields, ...(fields.some((field) => field !== 'protocol') ? { place } : {}) });
  }
}

async function addReadings(trx: SiteTransaction, { siteId, batchId, by, at }: Commit, touched: Map<string, Touched>): Promise<void> {
  const { rows } = await sql<{ id: string; fields: string[] }>`
    with added as (
      insert into size_reading (site_id, booking_id, quantity, value, source, spread, taken_on, tape_site, recorded_by, recorded_at)
      select b.site_id, b.id, q.quantity, q.value, q.source, q.spread,
        coalesce(nullif(q.taken_on, ''), ${localDay(at)}), q.tape_site, ${by}::uuid, ${at}::timestamptz
      from import_row i
      join booking b on b.site_id = i.site_id and b.accession = i.accession
      cross join ${READINGS}
      where i.site_id = ${siteId} and i.batch_id = ${batchId} and not ${KNOWN_READING}
      returning booking_id, quantity)
    select booking_id as id, array_agg(quantity order by quantity) as fields from added group by booking_id`.execute(trx);
  for (const { id, fields } of rows) {
    const before = touched.get(id);
    touched.set(id, { made: false, ...before, fields: [...(before?.fields ?? []), ...fields] });
  }
}

/** The line in the history of every booking that was moved, and of every proposed move that is settled by it. */
async function writeHistory(trx: SiteTransaction, { siteId, actor, at }: Commit, touched: ReadonlyMap<string, Touched>): Promise<void> {
  const moved = [...touched].filter(([, { place }]) => place !== undefined);
  const write = (kind: 'booked' | 'move-agreed', of: typeof moved) => sql`
    insert into booking_entry (site_id, booking_id, kind, data, actor_kind, actor_id, written_at)
    select ${siteId}::uuid, t.id, ${kind}, t.place::jsonb, ${actor.kind}, ${actor.id}::uuid, ${at}::timestamptz
    from unnest(${of.map(([id]) => id)}::uuid[], ${of.map(([, { place }]) => place!)}::text[]) t(id, place)`.execute(trx);
  await write('booked', moved);
  const agreed = new Set(await settleAgreedMoves(trx, siteId, moved.map(([id]) => id), at));
  if (agreed.size > 0) await write('move-agreed', moved.filter(([id]) => agreed.has(id)));
}

/**
 * Every row of an import at once: bookings made or changed, readings added, lists told that their answer is stale, and
 * the audit log, each one statement for all rows. Only ids and names of fields come back, to carry on with.
 */
export async function commitImportRows(trx: SiteTransaction, commit: Commit): Promise<Committed> {
  const { siteId, batchId, at, actor } = commit;
  // Against an import at the same moment: whoever is second sees what the first one booked.
  await sql`select pg_advisory_xact_lock(hashtextextended('import ' || ${siteId}::text, 0))`.execute(trx);
  const total = await countImportRows(trx, siteId, batchId);
  // Of rows that have just arrived the planner knows nothing and takes them for a few: it would then loop over loops.
  if (total > MANY_ROWS) await sql`set local enable_nestloop = off`.execute(trx);
  const touched = new Map<string, Touched>();
  await makeBookings(trx, commit, touched);
  await changeBookings(trx, commit, touched);
  await addReadings(trx, commit, touched);
  const changed = [...touched].filter(([, { made }]) => !made).map(([id]) => id);
  await sql`
    update booking_state s set stale = 1, recheck_at = ${at}, changed_at = ${at}, version = s.version + 1
    where s.site_id = ${siteId} and s.booking_id = any(${changed}::uuid[])`.execute(trx);
  await writeHistory(trx, commit, touched);
  await sql`
    insert into audit_event (site_id, actor_id, actor_kind, action, subject_type, subject_id, fields)
    select ${siteId}::uuid, ${actor.id}::uuid, ${actor.kind}, 'booking.import', 'booking', t.id, string_to_array(t.fields, ',')
    from unnest(${[...touched.keys()]}::uuid[], ${[...touched.values()].map(({ fields }) => fields.join(','))}::text[]) t(id, fields)`.execute(trx);
  const created = touched.size - changed.length;
  return { created, changed: changed.length, same: total - touched.size };
}
