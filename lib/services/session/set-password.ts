import { inTransaction, resolveToken, type TokenMatch } from '@/db/client';
import { insertAuditEvents } from '@/db/queries/audit-event/audit-events';
import { findSessionAccount } from '@/db/queries/app-user/read-people';
import { endSessions, setPasswordHash } from '@/db/queries/app-user/write-people';
import { consumeOneTimeToken, findTokenUser, voidOneTimeTokens } from '@/db/queries/one-time-token/one-time-tokens';
import { linkActor } from '@/lib/domain/access';
import { invalidField, ServiceError } from '@/lib/domain/errors';
import { passwordFault, type SessionAccount } from '@/lib/domain/people';
import { parseInput } from '@/lib/schemas/parse-input';
import { type SetPasswordInput, setPasswordSchema } from '@/lib/schemas/session/password';
import { argon2Hasher, type PasswordHasher } from './password-hash';
import { hashSecretToken } from './secret-token';

const ENDED = 'This link has been used or has expired. Ask for a new one on the sign-in page.';

/** Unknown, used, expired, or of a disabled account: all the same to whoever holds the link. */
async function resolveLink(token: string, now: Date): Promise<{ match: TokenMatch; account: SessionAccount }> {
  const match = await resolveToken('set-password', hashSecretToken(token));
  const account =
    match &&
    (await inTransaction(match.siteId, async (trx) => {
      const userId = await findTokenUser(trx, match.siteId, match.id, now);
      return userId === null ? null : findSessionAccount(trx, match.siteId, userId);
    }));
  if (!match || !account || account.disabled) throw new ServiceError('gone', { message: ENDED });
  return { match, account };
}

/** Whose password a link sets, without using it up: a mail scanner that opens links spoils nothing. */
export async function inspectPasswordLink(
  input: { readonly token: string },
  now: Date = new Date(),
): Promise<{ email: string; displayName: string; first: boolean }> {
  const { account } = await resolveLink(String(input.token).slice(0, 200), now);
  return { email: account.email, displayName: account.displayName, first: account.passwordHash === null };
}

/** Sets the password of the account a mailed link names, uses the link up, voids its siblings, ends all sessions. */
export async function setPassword(
  input: SetPasswordInput,
  passwords: PasswordHasher = argon2Hasher,
  now: Date = new Date(),
): Promise<{ email: string }> {
  const wanted = parseInput(setPasswordSchema, input);
  const { match, account } = await resolveLink(wanted.token, now);
  const fault = passwordFault(wanted.newPassword, [account.email, account.displayName]);
  if (fault) throw invalidField('newPassword', fault);
  const passwordHash = await passwords.hash(wanted.newPassword);

  await inTransaction(match.siteId, async (trx) => {
    const userId = await consumeOneTimeToken(trx, match.siteId, match.id, now);
    const present = userId && (await findSessionAccount(trx, match.siteId, userId));
    if (!userId || !present || present.disabled) throw new ServiceError('gone', { message: ENDED });
    await setPasswordHash(trx, match.siteId, userId, passwordHash);
    await endSessions(trx, match.siteId, userId);
    await voidOneTimeTokens(trx, match.siteId, userId, 'set-password', now);
    await insertAuditEvents(trx, match.siteId, linkActor(match.siteId, match.id), [
      { action: 'account.set-password', subjectType: 'person', subjectId: userId, fields: ['password'] },
    ]);
  });
  return { email: account.email };
}
