import { inTransaction } from '@/db/client';
import { countFailedMail, listMail as readMail, type OutboxRow } from '@/db/queries/outbox';
import { authorise, mayAttempt } from '@/lib/domain/access';
import type { MailList, MailView } from '@/lib/schemas/mail';
import { nowOf, type ServiceContext } from '../context';

/** More than anybody works through at once. */
const MOST_PROBLEMS = 200;
const MOST_SENT = 50;

/** A mail can go out again while what it carries still works: its link has not run out, its size request is open. */
export function canGoAgain({ status, payload, sizeRequest }: Pick<OutboxRow, 'status' | 'payload' | 'sizeRequest'>, now: Date): boolean {
  const { expiresAt } = (payload ?? {}) as { readonly expiresAt?: unknown };
  const runOut = typeof expiresAt === 'string' && Date.parse(expiresAt) <= now.getTime();
  return status !== 'sent' && !runOut && (sizeRequest === null || sizeRequest.open);
}

function toView(row: OutboxRow, now: Date, mayRetry: boolean): MailView {
  const { sizeRequest, status, attempts } = row;
  return {
    id: row.id, kind: row.kind, status, attempts,
    to: row.person ?? (sizeRequest?.addressMasked || 'address erased'),
    createdAt: row.createdAt.toISOString(),
    ...(sizeRequest ? { booking: { id: sizeRequest.bookingId, accession: sizeRequest.accession } } : {}),
    ...(row.sentAt ? { sentAt: row.sentAt.toISOString() } : {}),
    ...(status === 'queued' && attempts > 0 ? { nextAttemptAt: row.nextAttemptAt.toISOString() } : {}),
    ...(row.lastError === '' ? {} : { problem: row.lastError }),
    maySendAgain: mayRetry && (status === 'failed' || attempts > 0) && canGoAgain(row, now),
  };
}

/** What could not be delivered, what waits, and what went out last. */
export async function listMail(context: ServiceContext): Promise<MailList> {
  const { actor } = context;
  authorise(actor, 'mail.read');
  const mayRetry = mayAttempt(actor, 'mail.retry');
  const now = nowOf(context);
  return inTransaction(actor.siteId, async (trx) => {
    const of = async (status: OutboxRow['status'], limit: number) => (await readMail(trx, actor.siteId, status, limit)).map((row) => toView(row, now, mayRetry));
    return { failed: await of('failed', MOST_PROBLEMS), queued: await of('queued', MOST_PROBLEMS), sent: await of('sent', MOST_SENT) };
  });
}

/** Mails that were given up; none for whoever may not see mail. */
export async function countUndelivered({ actor }: ServiceContext): Promise<number> {
  if (!mayAttempt(actor, 'mail.read')) return 0;
  return inTransaction(actor.siteId, (trx) => countFailedMail(trx, actor.siteId));
}
