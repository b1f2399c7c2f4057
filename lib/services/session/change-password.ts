import { beginSignIn, forgiveSignIn, inTransaction } from '@/db/client';
import { findSessionAccount } from '@/db/queries/app-user/read-people';
import { endSessions, setPasswordHash } from '@/db/queries/app-user/write-people';
import { voidOneTimeTokens } from '@/db/queries/one-time-token/one-time-tokens';
import { authorise } from '@/lib/domain/access';
import { invalidField, ServiceError } from '@/lib/domain/errors';
import { passwordFault } from '@/lib/domain/people';
import { parseInput } from '@/lib/schemas/parse-input';
import { type ChangePasswordInput, changePasswordSchema } from '@/lib/schemas/session/password';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { argon2Hasher, type PasswordHasher } from './password-hash';
import { attemptKey } from './verify-sign-in';

/**
 * Replaces the actor's own password and ends every session, this one too: whoever knew the old password is out.
 * Wrong present passwords are slowed down like sign-in, so that an unattended screen cannot be used to guess.
 */
export async function changePassword(
  context: ServiceContext,
  input: ChangePasswordInput,
  passwords: PasswordHasher = argon2Hasher,
): Promise<{ email: string }> {
  const { actor } = context;
  const now = nowOf(context);
  const own = actor.userId === null ? null : { siteId: actor.siteId, id: actor.userId, ownerId: actor.userId };
  authorise(actor, 'account.change-password', own);
  const wanted = parseInput(changePasswordSchema, input);

  const key = attemptKey(own.id, 'change-password');
  const blockedUntil = await beginSignIn(key);
  if (blockedUntil) {
    throw new ServiceError('too-many', { retryAfterSeconds: (blockedUntil.getTime() - now.getTime()) / 1000 });
  }
  // Hashing is slow on purpose: it happens outside the transaction, which would hold a connection meanwhile.
  const account = await inTransaction(actor.siteId, (trx) => findSessionAccount(trx, own.siteId, own.id));
  if (!account?.passwordHash) throw new ServiceError('not-found');
  if (!(await passwords.verify(account.passwordHash, wanted.currentPassword))) {
    throw invalidField('currentPassword', 'This is not your present password.');
  }
  await forgiveSignIn(key);
  const fault = passwordFault(wanted.newPassword, [account.email, account.displayName]);
  if (fault) throw invalidField('newPassword', fault);
  if (wanted.newPassword === wanted.currentPassword) {
    throw invalidField('newPassword', 'This is the password you have now.');
  }
  const passwordHash = await passwords.hash(wanted.newPassword);

  await inTransaction(actor.siteId, async (trx) => {
    await setPasswordHash(trx, own.siteId, own.id, passwordHash);
    await endSessions(trx, own.siteId, own.id);
    await voidOneTimeTokens(trx, own.siteId, own.id, 'set-password', now);
    await recordAudit(trx, context, {
      action: 'account.change-password',
      subjectType: 'person',
      subjectId: own.id,
      fields: ['password'],
    });
  });
  return { email: account.email };
}
