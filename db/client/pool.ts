import { Kysely, PostgresDialect } from 'kysely';
import pg from 'pg';
import type { DB } from '@/db/types';

export type Database = Kysely<DB>;

/** Column types of ours need no parser of our own: int4 and float8 arrive as numbers, timestamptz as Date. */
export function openDatabase(connectionString: string, options: { max?: number } = {}): Database {
  const pool = new pg.Pool({
    connectionString,
    max: options.max ?? 10,
    connectionTimeoutMillis: 10_000,
    idleTimeoutMillis: 30_000,
    application_name: 'selvedge',
  });
  // A connection that the server drops, idle or in the middle of a transaction, would otherwise end the process: what
  // was running on it is told by its own rejection, and the next query reconnects.
  pool.on('error', () => {});
  pool.on('connect', (client) => client.on('error', () => {}));
  return new Kysely<DB>({ dialect: new PostgresDialect({ pool }) });
}

// Next's development server loads modules anew on every change; the pool must outlive that.
const shared = globalThis as typeof globalThis & { selvedgeDatabase?: Database };

/** The process's one pool, as the application role of DATABASE_URL. */
export function database(): Database {
  if (!shared.selvedgeDatabase) {
    const url = process.env.DATABASE_URL;
    if (!url) throw new Error('DATABASE_URL is not set: start with "npm start", or give the application role’s URL.');
    shared.selvedgeDatabase = openDatabase(url);
  }
  return shared.selvedgeDatabase;
}

export async function closeDatabase(): Promise<void> {
  const open = shared.selvedgeDatabase;
  shared.selvedgeDatabase = undefined;
  await open?.destroy();
}
