import { inTransaction } from '@/db/client';
import { findSessionAccount } from '@/db/queries/app-user/read-people';
import type { UserActor } from '@/lib/domain/access';

/**
 * The person a session names, as they are now: null when the account is disabled or gone, or when the session
 * was begun before the last "sign out everywhere" or password change.
 */
export async function loadUserActor(claims: {
  readonly siteId: string;
  readonly userId: string;
  readonly sessionEpoch: number;
}): Promise<UserActor | null> {
  const account = await inTransaction(claims.siteId, (trx) => findSessionAccount(trx, claims.siteId, claims.userId));
  if (!account || account.disabled || account.sessionEpoch !== claims.sessionEpoch) return null;
  return {
    kind: 'user',
    siteId: account.siteId,
    userId: account.userId,
    displayName: account.displayName,
    roles: account.roles,
  };
}
