import { type Kysely, sql } from 'kysely';

/** Rows of a file are copies on their way to bookings: once their import is over, or was left lying a day, they go. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`grant delete on import_row to selvedge_app`.execute(db);
  await sql`
    create policy erased_when_over on import_row as restrictive for delete to selvedge_app
      using (exists (
        select from import_batch b
        where b.site_id = import_row.site_id and b.id = import_row.batch_id
          and (b.status <> 'staging' or b.created_at < now() - interval '1 day')))`.execute(db);
}
