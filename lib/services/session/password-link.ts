import { insertOneTimeToken } from '@/db/queries/one-time-token/one-time-tokens';
import type { SiteTransaction } from '@/db/client';
import { environment } from '@/lib/env';
import { queueMail } from '@/lib/mail';
import { createHmac } from 'node:crypto';
import { hashSecretToken } from './secret-token';

const HOUR = 3_600_000;
/** An invitation may wait over a weekend and a few shifts; a reset is asked for by someone who sits and waits. */
export const LINK_HOURS = { invitation: 7 * 24, 'password-reset': 1 } as const;
export type PasswordLinkPurpose = keyof typeof LINK_HOURS;

/**
 * The secret of a mailed link, 256 bits, made from the mail's id and the server's session secret each time the mail
 * is written. So it waits nowhere: the outbox and the queue hold ids, the token table a hash. A mail that is sent
 * twice is the same mail with the same link. Whoever could make such links from the session secret could as well
 * make sessions from it, so this trusts nothing that is not trusted already. (A mail still queued while that secret
 * is replaced carries a dead link; asking again mends it.)
 */
function linkSecret(mailId: string): string {
  return createHmac('sha256', environment().sessionSecret).update(`set-password ${mailId}`).digest('base64url');
}

/** The link of one mail. Its secret is in the fragment, which browsers never send: it stays out of logs and referrers. */
export function passwordLink(mailId: string): string {
  return `${environment().publicUrl}/set-password#${linkSecret(mailId)}`;
}

/** Queues the mail and stores the hash of its link, in the transaction of the event. */
export async function queuePasswordLink(
  trx: SiteTransaction,
  link: { readonly siteId: string; readonly userId: string; readonly purpose: PasswordLinkPurpose },
  now: Date,
): Promise<void> {
  const expiresAt = new Date(now.getTime() + LINK_HOURS[link.purpose] * HOUR);
  const mailId = await queueMail(trx, link.siteId, {
    kind: link.purpose,
    to: { userId: link.userId },
    payload: { expiresAt: expiresAt.toISOString() },
  });
  await insertOneTimeToken(trx, {
    siteId: link.siteId,
    kind: 'set-password',
    tokenHash: hashSecretToken(linkSecret(mailId)),
    userId: link.userId,
    expiresAt,
  });
}
