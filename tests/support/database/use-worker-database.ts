import pg from 'pg';
import { afterAll, inject } from 'vitest';
import { closeDatabase } from '@/db/client';
import { closeOwnerDatabase } from './owner-database';
import { TEMPLATE } from './throw-away-cluster';

/**
 * Each worker has a database of its own, copied from the migrated template, so that files run side by side. The files of
 * one worker share it, one after another: every test makes sites of its own and looks at those.
 */
const urls = inject('clusterUrls');
const name = `worker_${process.env.VITEST_POOL_ID ?? '1'}`;

const client = new pg.Client({ connectionString: `${urls.owner}postgres` });
await client.connect();
try {
  await client.query(`create database ${name} template ${TEMPLATE}`);
} catch (error) {
  // 42P04: an earlier file of this worker made it.
  if ((error as { code?: string }).code !== '42P04') throw error;
} finally {
  await client.end();
}

process.env.DATABASE_URL = `${urls.app}${name}`;
process.env.MIGRATION_DATABASE_URL = `${urls.owner}${name}`;
process.env.NEXTAUTH_URL = 'http://127.0.0.1:3000';
process.env.NEXTAUTH_SECRET = 'only-for-tests-only-for-tests-only-for-tests';
process.env.SMTP_URL = 'smtp://127.0.0.1:9';

afterAll(async () => {
  await closeDatabase();
  await closeOwnerDatabase();
});
