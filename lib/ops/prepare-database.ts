import { Kysely, PostgresDialect, sql } from 'kysely';
import pg from 'pg';
import { migrateToLatest } from '@/db/client/migrate';
import { createQueues } from '@/lib/jobs/create-queues';

/** Any number will do, as long as every Selvedge process uses the same. */
const LOCK = 7_239_401;

/**
 * Migrates and creates the queues as the owner. Several hosts may start at once: an advisory lock, held by a session of
 * its own for the whole time, lets one of them work and the others find it done.
 */
export async function prepareDatabase(ownerUrl: string): Promise<string[]> {
  const lock = new pg.Client({ connectionString: ownerUrl });
  await lock.connect();
  const owner = new Kysely<unknown>({
    dialect: new PostgresDialect({ pool: new pg.Pool({ connectionString: ownerUrl, max: 2 }) }),
  });
  try {
    await lock.query('select pg_advisory_lock($1)', [LOCK]);
    const done = await migrateToLatest(owner);
    await createQueues(ownerUrl);
    await sql`grant usage on schema pgboss to selvedge_app`.execute(owner);
    await sql`grant select, insert, update, delete on all tables in schema pgboss to selvedge_app`.execute(owner);
    return done;
  } finally {
    await owner.destroy();
    await lock.end();
  }
}
