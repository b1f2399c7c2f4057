import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import { type Actor, actorReference } from '@/lib/domain/access';
import type { AuditEntry, AuditEvent } from '@/lib/domain/audit/audit-event';

export async function insertAuditEvents(
  trx: SiteTransaction,
  siteId: string,
  actor: Actor,
  entries: readonly AuditEntry[],
): Promise<void> {
  if (entries.length === 0) return;
  const by = actorReference(actor);
  await trx
    .insertInto('audit_event')
    .values(
      entries.map((entry) => ({
        site_id: siteId,
        actor_id: by.id,
        actor_kind: by.kind,
        action: entry.action,
        subject_type: entry.subjectType,
        subject_id: entry.subjectId,
        fields: [...(entry.fields ?? [])],
      })),
    )
    .execute();
}

export interface AuditFilter {
  readonly action?: string;
  readonly subjectType?: string;
  readonly subjectId?: string;
  readonly actorId?: string;
  /** Position after which to go on: microseconds since 1970 as text (a Date would lose three digits) and id. */
  readonly before?: { readonly at: string; readonly id: string };
  readonly limit: number;
}

export interface AuditPage {
  readonly events: AuditEvent[];
  readonly next: { readonly at: string; readonly id: string } | null;
}

/** Newest first, by position rather than page number: lines written meanwhile shift nothing. */
export async function listAuditEvents(trx: SiteTransaction, siteId: string, filter: AuditFilter): Promise<AuditPage> {
  let query = trx
    .selectFrom('audit_event as e')
    .leftJoin('app_user as u', (join) =>
      join.onRef('u.site_id', '=', 'e.site_id').onRef('u.id', '=', 'e.actor_id').on('e.actor_kind', '=', 'user'),
    )
    .leftJoin('api_token as t', (join) =>
      join.onRef('t.site_id', '=', 'e.site_id').onRef('t.id', '=', 'e.actor_id').on('e.actor_kind', '=', 'token'),
    )
    .select(['e.id', 'e.at', 'e.actor_kind', 'e.actor_id', 'e.action', 'e.subject_type', 'e.subject_id', 'e.fields'])
    .select([sql<string>`(extract(epoch from e.at) * 1000000)::bigint::text`.as('at_exact'), sql<string | null>`coalesce(u.display_name, t.name)`.as('actor_name')])
    .where('e.site_id', '=', siteId)
    .orderBy('e.at', 'desc')
    .orderBy('e.id', 'desc')
    .limit(filter.limit + 1);
  if (filter.action) query = query.where('e.action', '=', filter.action);
  if (filter.subjectType) query = query.where('e.subject_type', '=', filter.subjectType);
  if (filter.subjectId) query = query.where('e.subject_id', '=', filter.subjectId);
  if (filter.actorId) query = query.where('e.actor_id', '=', filter.actorId);
  if (filter.before) {
    const { at, id } = filter.before;
    query = query.where(sql<boolean>`(e.at, e.id) < (timestamptz 'epoch' + ${at}::bigint * interval '1 microsecond', ${id}::uuid)`);
  }
  const rows = await query.execute();
  const page = rows.slice(0, filter.limit);
  const last = page.at(-1);
  return {
    events: page.map((row) => ({
      id: row.id,
      at: row.at,
      actorKind: row.actor_kind as AuditEvent['actorKind'],
      actorId: row.actor_id,
      actorName: row.actor_name,
      action: row.action,
      subjectType: row.subject_type,
      subjectId: row.subject_id,
      fields: row.fields,
    })),
    next: rows.length > filter.limit && last ? { at: last.at_exact, id: last.id } : null,
  };
}
