import { inTransaction } from '@/db/client';
import { listAuditEvents } from '@/db/queries/audit-event/audit-events';
import { authorise } from '@/lib/domain/access';
import type { AuditEvent } from '@/lib/domain/audit/audit-event';
import { type AuditFilterInput, auditFilterSchema } from '@/lib/schemas/audit/audit-filter';
import { parseInput } from '@/lib/schemas/parse-input';
import type { ServiceContext } from '../context';

const PAGE_LENGTH = 50;

export interface AuditPageView {
  readonly events: readonly AuditEvent[];
  readonly filter: AuditFilterInput;
  /** Give it back as `before` for the next page; null at the end. */
  readonly next: string | null;
}

/** The site's audit log, newest first. */
export async function listAudit(context: ServiceContext, input: unknown): Promise<AuditPageView> {
  const { actor } = context;
  authorise(actor, 'audit.read');
  const filter = parseInput(auditFilterSchema, input);
  const [at, id] = filter.before?.split('~') ?? [];
  const page = await inTransaction(actor.siteId, (trx) =>
    listAuditEvents(trx, actor.siteId, {
      action: filter.action,
      subjectType: filter.subject,
      subjectId: filter.id,
      actorId: filter.by,
      before: at && id ? { at, id } : undefined,
      limit: PAGE_LENGTH,
    }),
  );
  return { events: page.events, filter, next: page.next && `${page.next.at}~${page.next.id}` };
}
