import { type Database, inTransaction } from '@/db/client';
import { type SeedAccount, seedSite } from './seed-site';

export interface SeedOptions {
  /** A connection as the owner: the application may not create a site. */
  readonly db: Database;
  /** The demo site's people, with the hashes of passwords drawn for this installation. */
  readonly accounts: readonly SeedAccount[];
}

export const DEMO_SITE_ID = '5e1aed9e-0000-4000-8000-000000000001';

/** The demo site: an invented scenario of ours. Running it again changes nothing. */
export async function seedDemo({ db, accounts }: SeedOptions): Promise<void> {
  await inTransaction(
    DEMO_SITE_ID,
    async (trx) => {
      await seedSite(trx, DEMO_SITE_ID, accounts);
    },
    db,
  );
}
