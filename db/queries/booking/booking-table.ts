import { sql, type RawBuilder } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import type { PreCheckResult } from '@/lib/domain/pre-check/result';
import { overviews, toOverview, type BookingOverview } from './bookings';

export interface TableFilter {
  readonly from: Date;
  readonly before: Date;
  readonly result?: PreCheckResult | 'unchecked';
  readonly scannerId?: string;
  readonly protocolId?: string;
  /** Part of an accession number, any case. */
  readonly find?: string;
}

export type TableSort = 'time' | 'result' | 'over' | 'changed';

export interface TablePosition {
  readonly key: number;
  readonly scheduledAt: Date;
  readonly id: string;
}

export interface TableWindow extends TableFilter {
  readonly sort: TableSort;
  readonly descending: boolean;
  readonly limit: number;
  readonly after?: TablePosition;
}

/** Every order as one number, so that one rule pages through all of them; moments in whole milliseconds. */
const KEYS: Readonly<Record<TableSort, RawBuilder<number>>> = {
  time: sql<number>`(extract(epoch from b.scheduled_at) * 1000)::float8`,
  result: sql<number>`t.result_rank::float8`,
  over: sql<number>`(case when t.result = '' then -1 else t.minutes_over end)::float8`,
  changed: sql<number>`floor(extract(epoch from t.changed_at) * 1000)::float8`,
};

export interface TableRow extends BookingOverview {
  readonly key: number;
}

function filtered(trx: SiteTransaction, siteId: string, filter: TableFilter) {
  let query = overviews(trx, siteId)
    .where('b.scheduled_at', '>=', filter.from)
    .where('b.scheduled_at', '<', filter.before);
  if (filter.result) query = query.where('t.result', '=', filter.result === 'unchecked' ? '' : filter.result);
  if (filter.scannerId) query = query.where('b.booked_scanner_id', '=', filter.scannerId);
  if (filter.protocolId) query = query.where('b.protocol_id', '=', filter.protocolId);
  // Not an index question: the days bound it, and a pattern would need escaping.
  if (filter.find) query = query.where(sql<boolean>`position(lower(${filter.find}) in lower(b.accession)) > 0`);
  return query;
}

/** The query of one page; one more row than the limit tells whether there is another. */
export function tableQuery(trx: SiteTransaction, siteId: string, window: TableWindow) {
  const key = KEYS[window.sort];
  const direction = window.descending ? 'desc' : 'asc';
  let query = filtered(trx, siteId, window)
    .select(key.as('sort_key'))
    .orderBy(key, direction)
    .orderBy('b.scheduled_at')
    .orderBy('b.id')
    .limit(window.limit + 1);
  if (window.after) {
    const { key: last, scheduledAt, id } = window.after;
    const beyond = window.descending ? sql<boolean>`${key} < ${last}` : sql<boolean>`${key} > ${last}`;
    query = query.where(
      sql<boolean>`(${beyond} or (${key} = ${last} and (b.scheduled_at, b.id) > (${scheduledAt}::timestamptz, ${id}::uuid)))`,
    );
  }
  return query;
}

export async function readBookingTable(trx: SiteTransaction, siteId: string, window: TableWindow): Promise<TableRow[]> {
  const rows = await tableQuery(trx, siteId, window).execute();
  return rows.map((row) => ({ ...toOverview(row), key: row.sort_key }));
}

/** How many of these days' bookings came to each result, the rest of the filter applied. */
export async function countResults(trx: SiteTransaction, siteId: string, filter: Omit<TableFilter, 'result'>): Promise<Record<string, number>> {
  let query = trx
    .selectFrom('booking as b')
    .innerJoin('booking_state as t', (join) => join.onRef('t.site_id', '=', 'b.site_id').onRef('t.booking_id', '=', 'b.id'))
    .select((eb) => ['t.result', eb.fn.countAll<string>().as('bookings')])
    .where('b.site_id', '=', siteId)
    .where('b.scheduled_at', '>=', filter.from)
    .where('b.scheduled_at', '<', filter.before)
    .groupBy('t.result');
  if (filter.scannerId) query = query.where('b.booked_scanner_id', '=', filter.scannerId);
  if (filter.protocolId) query = query.where('b.protocol_id', '=', filter.protocolId);
  if (filter.find) query = query.where(sql<boolean>`position(lower(${filter.find}) in lower(b.accession)) > 0`);
  const rows = await query.execute();
  return Object.fromEntries(rows.map(({ result, bookings }) => [result || 'unchecked', Number(bookings)]));
}

/** Bookings a lead was asked to decide, soonest first. */
export async function listEscalated(trx: SiteTransaction, siteId: string, from: Date, limit: number): Promise<BookingOverview[]> {
  const rows = await overviews(trx, siteId)
    .where('t.escalation', '=', 'open')
    .where('b.scheduled_at', '>=', from)
    .orderBy('b.scheduled_at')
    .orderBy('b.id')
    .limit(limit)
    .execute();
  return rows.map(toOverview);
}
