import { randomUUID } from 'node:crypto';
import { inTransaction, type SiteTransaction } from '@/db/client';
import type { Role, UserActor } from '@/lib/domain/access';
import { ownerDatabase } from './owner-database';

export interface TestSite {
  readonly siteId: string;
  /** Adds a person with these roles and returns them as the actor they are after signing in. */
  person(...roles: Role[]): Promise<UserActor>;
  /** A transaction of the application role for this site. */
  withApp<T>(work: (trx: SiteTransaction) => Promise<T>): Promise<T>;
}

/** A new, empty site. Tests that run side by side each make their own. */
export async function createTestSite(
  options: { readonly name?: string; readonly accessionPattern?: string } = {},
): Promise<TestSite> {
  const siteId = randomUUID();
  await inTransaction(
    siteId,
    (trx) =>
      trx
        .insertInto('site')
        .values({
          id: siteId,
          name: options.name ?? `Site ${siteId.slice(0, 8)}`,
          accession_pattern: options.accessionPattern ?? '@@########',
        })
        .execute(),
    ownerDatabase(),
  );
  return {
    siteId,
    person: (...roles) => createTestPerson(siteId, roles),
    withApp: (work) => inTransaction(siteId, work),
  };
}

async function createTestPerson(siteId: string, roles: readonly Role[]): Promise<UserActor> {
  const userId = randomUUID();
  const displayName = `Person ${userId.slice(0, 8)}`;
  await inTransaction(siteId, (trx) =>
    trx
      .insertInto('app_user')
      .values({
        site_id: siteId,
        id: userId,
        email: `${userId}@people.example`,
        display_name: displayName,
        roles: [...roles],
      })
      .execute(),
  );
  return { kind: 'user', siteId, userId, displayName, roles };
}
