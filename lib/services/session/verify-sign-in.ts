import { beginSignIn, forgiveSignIn, inTransaction, resolveSignIn } from '@/db/client';
import { findSessionAccount } from '@/db/queries/app-user/read-people';
import { ServiceError } from '@/lib/domain/errors';
import { normaliseEmail, type SessionAccount } from '@/lib/domain/people';
import { signInSchema } from '@/lib/schemas/session/sign-in';
import { createHash } from 'node:crypto';
import { insertAuditEvents } from '@/db/queries/audit-event/audit-events';
import { argon2Hasher, type PasswordHasher, UNMATCHABLE_HASH } from './password-hash';

/** Tries are counted per account and network address, under a hash: the table tells nobody who tried. */
export function attemptKey(email: string, address: string): string {
  return createHash('sha256').update(`${normaliseEmail(email)}\u0000${address}`).digest('hex');
}

const REFUSED = 'E-mail address and password do not belong together.';

/**
 * Checks an e-mail address and password. Whatever is wrong (no such account, disabled, invited only, wrong password),
 * a stranger gets the same words after the same work: one counted try and one hash verification.
 */
export async function verifySignIn(
  input: { readonly email: string; readonly password: string; readonly address: string },
  passwords: PasswordHasher = argon2Hasher,
  now: Date = new Date(),
): Promise<SessionAccount> {
  const key = attemptKey(input.email, input.address);
  const blockedUntil = await beginSignIn(key);
  if (blockedUntil) {
    throw new ServiceError('too-many', { retryAfterSeconds: (blockedUntil.getTime() - now.getTime()) / 1000 });
  }

  const typed = signInSchema.safeParse(input);
  const match = typed.success ? await resolveSignIn(typed.data.email) : null;
  const matches = await passwords.verify(match?.passwordHash ?? UNMATCHABLE_HASH, typed.data?.password ?? '');
  if (!match?.passwordHash || !matches) throw new ServiceError('unauthenticated', { message: REFUSED });

  const account = await inTransaction(match.siteId, async (trx) => {
    const found = await findSessionAccount(trx, match.siteId, match.userId);
    if (!found || found.disabled) return null;
    await insertAuditEvents(
      trx,
      match.siteId,
      { kind: 'user', siteId: match.siteId, userId: match.userId, displayName: found.displayName, roles: found.roles },
      [{ action: 'account.sign-in', subjectType: 'person', subjectId: match.userId }],
    );
    return found;
  });
  if (!account) throw new ServiceError('unauthenticated', { message: REFUSED });
  await forgiveSignIn(key);
  return account;
}
