import type { SiteTransaction } from '@/db/client';
import type { Session } from '@/lib/domain/pre-check/room';

export interface SessionRecord extends Session {
  readonly siteId: string;
  readonly id: string;
  readonly scannerId: string;
  readonly scannerName: string;
}

/** Sessions that touch a span of time, by scanner and time. */
export async function listSessions(
  trx: SiteTransaction,
  siteId: string,
  span: { readonly from: Date; readonly before: Date; readonly scannerId?: string },
): Promise<SessionRecord[]> {
  // No session is longer than a day, so the index bounds both ends.
  const earliest = new Date(span.from.getTime() - 86_400_000);
  let query = trx
    .selectFrom('scanner_session as e')
    .innerJoin('scanner as s', (join) => join.onRef('s.site_id', '=', 'e.site_id').onRef('s.id', '=', 'e.scanner_id'))
    .select(['e.site_id', 'e.id', 'e.scanner_id', 's.name', 'e.starts_at', 'e.ends_at'])
    .where('e.site_id', '=', siteId)
    .where('e.status', '=', 'open')
    .where('e.starts_at', '>=', earliest)
    .where('e.starts_at', '<', span.before)
    .where('e.ends_at', '>', span.from)
    .orderBy('s.name')
    .orderBy('e.starts_at');
  if (span.scannerId) query = query.where('e.scanner_id', '=', span.scannerId);
  return (await query.execute()).map((row) => ({
    siteId: row.site_id, id: row.id, scannerId: row.scanner_id, scannerName: row.name, startsAt: row.starts_at, endsAt: row.ends_at,
  }));
}

export async function findSession(trx: SiteTransaction, siteId: string, id: string): Promise<SessionRecord | null> {
  const row = await trx
    .selectFrom('scanner_session as e')
    .innerJoin('scanner as s', (join) => join.onRef('s.site_id', '=', 'e.site_id').onRef('s.id', '=', 'e.scanner_id'))
    .select(['e.site_id', 'e.id', 'e.scanner_id', 's.name', 'e.starts_at', 'e.ends_at'])
    .where('e.site_id', '=', siteId).where('e.id', '=', id).where('e.status', '=', 'open')
    .executeTakeFirst();
  return row
    ? { siteId: row.site_id, id: row.id, scannerId: row.scanner_id, scannerName: row.name, startsAt: row.starts_at, endsAt: row.ends_at }
    : null;
}

/** Two people entering sessions of one scanner take turns. */
export async function lockScanner(trx: SiteTransaction, siteId: string, scannerId: string): Promise<void> {
  await trx.selectFrom('scanner').select('id').where('site_id', '=', siteId).where('id', '=', scannerId).forUpdate().execute();
}

export async function insertSessions(
  trx: SiteTransaction,
  siteId: string,
  sessions: readonly (Session & { readonly scannerId: string; readonly id?: string })[],
  createdBy: string,
): Promise<string[]> {
  const rows = await trx
    .insertInto('scanner_session')
    .values(sessions.map(({ id, scannerId, startsAt, endsAt }) => ({
      site_id: siteId, scanner_id: scannerId, starts_at: startsAt, ends_at: endsAt, created_by: createdBy, ...(id ? { id } : {}),
    })))
    .onConflict((conflict) => conflict.doNothing())
    .returning('id')
    .execute();
  return rows.map(({ id }) => id);
}

export async function removeSession(trx: SiteTransaction, siteId: string, id: string): Promise<boolean> {
  const removed = await trx
    .updateTable('scanner_session').set({ status: 'removed' })
    .where('site_id', '=', siteId).where('id', '=', id).where('status', '=', 'open').executeTakeFirst();
  return removed.numUpdatedRows === 1n;
}
