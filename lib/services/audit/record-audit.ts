import type { SiteTransaction } from '@/db/client';
import { insertAuditEvents } from '@/db/queries/audit-event/audit-events';
import type { AuditEntry } from '@/lib/domain/audit/audit-event';
import type { ServiceContext } from '../context';

/**
 * Writes who did what, in the same transaction as the change, so that neither can exist without the other.
 * Call it after `authorise`; the site is the actor's own.
 */
export async function recordAudit(
  trx: SiteTransaction,
  context: ServiceContext,
  ...entries: readonly AuditEntry[]
): Promise<void> {
  await insertAuditEvents(trx, context.actor.siteId, context.actor, entries);
}
