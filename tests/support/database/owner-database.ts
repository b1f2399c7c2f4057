import { type Database, openDatabase } from '@/db/client';

let open: Database | undefined;

/** This worker's database as its owner: only for what the application itself may not do, such as creating a site. */
export function ownerDatabase(): Database {
  open ??= openDatabase(String(process.env.MIGRATION_DATABASE_URL), { max: 2 });
  return open;
}

export async function closeOwnerDatabase(): Promise<void> {
  const closing = open;
  open = undefined;
  await closing?.destroy();
}
