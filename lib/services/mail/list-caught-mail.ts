import { inTransaction } from '@/db/client';
import { listMessageIds } from '@/db/queries/outbox';
import { authorise } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { environment } from '@/lib/env';
import { type CaughtMail, listCaughtMail as readCatcher } from '@/lib/mail';
import type { ServiceContext } from '../context';

const NEWEST = 200;

/** Whether mail stays on this machine, in the local catcher. */
export const catchesMail = () => environment().caughtMailFolder !== null;

export interface CaughtMailView {
  readonly messageId: string;
  readonly receivedAt: Date;
  readonly to: string;
  readonly subject: string;
  readonly text: string;
}

/**
 * The site's newest mails as the local catcher holds them. Where mail goes to a real server there is nothing here to
 * see. The catcher keeps the mail of all sites together, so what is shown is chosen by the site's own outbox.
 */
export async function listCaughtMail(
  context: ServiceContext,
  catcher: () => Promise<CaughtMail[] | null> = readCatcher,
): Promise<CaughtMailView[]> {
  const { actor } = context;
  authorise(actor, 'mail.read-caught');
  const caught = await catcher();
  if (caught === null) throw new ServiceError('not-found');
  const ours = new Set(await inTransaction(actor.siteId, (trx) => listMessageIds(trx, actor.siteId, NEWEST)));
  return caught
    .filter(({ messageId }) => ours.has(messageId))
    .map(({ messageId, receivedAt, to, subject, text }) => ({
      messageId,
      receivedAt: new Date(receivedAt),
      to,
      subject,
      text,
    }));
}
