import { openDatabase } from '@/db/client';
import { seedDemo } from '@/db/seed';
import { argon2Hasher } from '@/lib/services/session/password-hash';
import { type DemoAccount, demoAccounts } from './demo-accounts';

/** Puts the demo site and its people into the local database; a second time changes nothing. */
export async function seedDemoSite(ownerUrl: string, dataDir: string): Promise<DemoAccount[]> {
  const accounts = await demoAccounts(dataDir);
  const db = openDatabase(ownerUrl, { max: 2 });
  try {
    await seedDemo({
      db,
      accounts: await Promise.all(
        accounts.map(async ({ password, ...person }) => ({ ...person, passwordHash: await argon2Hasher.hash(password) })),
      ),
    });
  } finally {
    await db.destroy();
  }
  return accounts;
}
