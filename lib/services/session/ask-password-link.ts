import { beginSignIn, inTransaction, resolveSignIn } from '@/db/client';
import { insertAuditEvents } from '@/db/queries/audit-event/audit-events';
import { linkActor } from '@/lib/domain/access';
import { parseInput } from '@/lib/schemas/parse-input';
import { type AskPasswordLinkInput, askPasswordLinkSchema } from '@/lib/schemas/session/password';
import { queuePasswordLink } from './password-link';
import { attemptKey } from './verify-sign-in';

/**
 * Mails a link for a new password, if there is such an account. Nothing is returned, and the caller answers before
 * this has run, so neither words nor time tell whether there is one. Repeated asking is slowed down without a word.
 */
export async function askPasswordLink(
  input: AskPasswordLinkInput & { readonly address: string },
  now: Date = new Date(),
): Promise<void> {
  const { email } = parseInput(askPasswordLinkSchema, input);
  if (await beginSignIn(attemptKey(email, `password-link ${input.address}`))) return;
  const match = await resolveSignIn(email);
  if (!match) return;
  const { siteId, userId } = match;
  // Earlier links stay good until one is used, or a stranger could spoil the one its owner waits for.
  // An invited person has no password yet: they get a fresh invitation, which lasts longer.
  const purpose = match.passwordHash === null ? 'invitation' : 'password-reset';
  await inTransaction(siteId, async (trx) => {
    await queuePasswordLink(trx, { siteId, userId, purpose }, now);
    await insertAuditEvents(trx, siteId, linkActor(siteId, userId), [
      { action: 'account.ask-password-link', subjectType: 'person', subjectId: userId },
    ]);
  });
}
