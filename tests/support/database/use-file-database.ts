import { randomUUID } from 'node:crypto';
import pg from 'pg';
import { afterAll, inject } from 'vitest';
import { closeDatabase } from '@/db/client';
import { closeOwnerDatabase } from './owner-database';
import { TEMPLATE } from './throw-away-cluster';

/**
 * Each test file has a database of its own, copied from the migrated template and dropped after it, so that neither what
 * ran beside it nor what ran before it in the same worker can be seen.
 */
const urls = inject('clusterUrls');
const name = `file_${randomUUID().replaceAll('-', '')}`;

async function runAs(login: 'owner' | 'superuser', statement: string): Promise<void> {
  const client = new pg.Client({ connectionString: `${urls[login]}postgres` });
  await client.connect();
  try {
    await client.query(statement);
  } finally {
    await client.end();
  }
}

await runAs('owner', `create database ${name} template ${TEMPLATE}`);

process.env.DATABASE_URL = `${urls.app}${name}`;
process.env.MIGRATION_DATABASE_URL = `${urls.owner}${name}`;
process.env.NEXTAUTH_URL = 'http://127.0.0.1:3000';
process.env.NEXTAUTH_SECRET = 'only-for-tests-only-for-tests-only-for-tests';
process.env.SMTP_URL = 'smtp://127.0.0.1:9';

afterAll(async () => {
  await closeDatabase();
  await closeOwnerDatabase();
  // A connection that has just been closed may still be ending on the server: only a superuser may hurry any login's along.
  await runAs('superuser', `drop database ${name} with (force)`);
});
