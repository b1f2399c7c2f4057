import { randomBytes } from 'node:crypto';
import pg from 'pg';
import { inject } from 'vitest';
import { closeDatabase } from '@/db/client';
import { closeOwnerDatabase } from './owner-database';
import { TEMPLATE } from './throw-away-cluster';

/**
 * Turns this test file to a database of its own, for tests that run a whole worker: it serves every site in its
 * database, and would take up the work that another file's tests have left.
 */
export async function useOwnDatabase(): Promise<void> {
  const urls = inject('clusterUrls');
  const name = `own_${randomBytes(6).toString('hex')}`;
  const client = new pg.Client({ connectionString: `${urls.owner}postgres` });
  await client.connect();
  await client.query(`create database ${name} template ${TEMPLATE}`).finally(() => client.end());
  await closeDatabase();
  await closeOwnerDatabase();
  process.env.DATABASE_URL = `${urls.app}${name}`;
  process.env.MIGRATION_DATABASE_URL = `${urls.owner}${name}`;
}
