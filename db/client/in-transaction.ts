import { type Transaction, sql } from 'kysely';
import type { DB } from '@/db/types';
import { type Database, database } from './pool';

/** A transaction that sees one site's rows and no others. Queries take it and, besides, the site id. */
export type SiteTransaction = Transaction<DB>;

const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i;

/**
 * Runs `work` in one transaction in which row-level security lets through the rows of `siteId` only.
 * The setting is local to the transaction, so a pooled connection never carries a site over to the next caller.
 */
export async function inTransaction<T>(
  siteId: string,
  work: (trx: SiteTransaction) => Promise<T>,
  db: Database = database(),
): Promise<T> {
  if (!UUID.test(siteId)) throw new Error('A transaction needs the id of a site.');
  return db.transaction().execute(async (trx) => {
    await sql`select set_config('app.site_id', ${siteId}, true)`.execute(trx);
    return work(trx);
  });
}
