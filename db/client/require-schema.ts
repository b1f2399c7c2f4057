import { sql } from 'kysely';
import { SCHEMA_VERSION } from '@/db/types/schema-version';
import { type Database, database } from './pool';

/**
 * Refuses a database of another schema version, and a login that row-level security would not hold back:
 * a superuser, one that bypasses it, or the owner of the tables.
 */
export async function requireSchema(db: Database = database()): Promise<void> {
  const { rows: logins } = await sql<{ login: string; above: boolean }>`
    select r.rolname as login,
      r.rolsuper or r.rolbypassrls or exists (
        select from pg_class c where c.relowner = r.oid and c.relnamespace = 'public'::regnamespace
      ) as above
    from pg_roles r where r.rolname = current_user`.execute(db);
  if (logins[0]?.above !== false) {
    throw new Error(
      `DATABASE_URL signs in as "${logins[0]?.login}", which row-level security does not hold back. ` +
        'Use the application role (selvedge_app, or a login that is a member of it).',
    );
  }
  const { rows } = await sql<{ name: string }>`
    select name from public.kysely_migration order by name desc limit 1`.execute(db).catch((cause: unknown) => {
    throw new Error('The database has no Selvedge schema: run "npm run db:migrate" as its owner first.', { cause });
  });
  const found = rows[0]?.name ?? 'none';
  if (found !== SCHEMA_VERSION) {
    throw new Error(
      `The database is at schema "${found}", this program needs "${SCHEMA_VERSION}". ` +
        (found > SCHEMA_VERSION ? 'Start the newer program.' : 'Run "npm run db:migrate" as its owner.'),
    );
  }
}
