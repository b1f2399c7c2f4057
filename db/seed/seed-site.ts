import type { SiteTransaction } from '@/db/client';

export interface SeedAccount {
  readonly email: string;
  readonly displayName: string;
  readonly roles: readonly string[];
  readonly passwordHash: string;
}

export async function seedSite(
  trx: SiteTransaction,
  siteId: string,
  accounts: readonly SeedAccount[],
): Promise<void> {
  await trx
    .insertInto('site')
    .values({ id: siteId, name: 'Weavers Hill Imaging', accession_pattern: '^[A-Z]{2}[0-9]{8}$' })
    .onConflict((conflict) => conflict.column('id').doNothing())
    .execute();
  await trx
    .insertInto('app_user')
    .values(
      accounts.map((account) => ({
        site_id: siteId,
        email: account.email,
        display_name: account.displayName,
        roles: [...account.roles],
        password_hash: account.passwordHash,
      })),
    )
    .onConflict((conflict) => conflict.columns(['site_id', 'email']).doNothing())
    .execute();
}
