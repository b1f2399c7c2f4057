import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import type { Paper, SheetRecord, SheetState } from '@/lib/domain/plan/sheet';

/** Everything but the file itself, whose length is enough to show. */
function sheets(trx: SiteTransaction, siteId: string) {
  return trx
    .selectFrom('plan_sheet as f')
    .select(['f.site_id', 'f.id', 'f.plan_id', 'f.plan_version', 'f.paper', 'f.content_hash', 'f.status', 'f.attempts'])
    .select(sql<number | null>`octet_length(f.bytes)`.as('size_bytes'))
    .where('f.site_id', '=', siteId);
}

type SheetRow = Awaited<ReturnType<ReturnType<typeof sheets>['execute']>>[number];

const toSheet = (row: SheetRow): SheetRecord => ({
  siteId: row.site_id,
  id: row.id,
  planId: row.plan_id,
  planVersion: row.plan_version,
  paper: row.paper as Paper,
  contentHash: row.content_hash,
  state: row.status as SheetState,
  attempts: row.attempts,
  sizeBytes: row.size_bytes,
});

export interface SheetContent {
  readonly siteId: string;
  readonly planId: string;
  readonly planVersion: number;
  readonly paper: Paper;
  readonly contentHash: string;
}

export async function findSheet(trx: SiteTransaction, siteId: string, id: string): Promise<SheetRecord | null> {
  const row = await sheets(trx, siteId).where('f.id', '=', id).executeTakeFirst();
  return row ? toSheet(row) : null;
}

/** The file of exactly this content, made or in the making. */
export async function findSheetOf(trx: SiteTransaction, content: SheetContent): Promise<SheetRecord | null> {
  const row = await sheets(trx, content.siteId)
    .where('f.plan_id', '=', content.planId)
    .where('f.plan_version', '=', content.planVersion)
    .where('f.paper', '=', content.paper)
    .where('f.content_hash', '=', content.contentHash)
    .executeTakeFirst();
  return row ? toSheet(row) : null;
}

/** A place for this content; one that is there already stays as it is, except that a failed one is tried afresh. */
export async function queueSheet(trx: SiteTransaction, content: SheetContent, asked: { readonly by: string; readonly at: Date }): Promise<void> {
  await trx
    .insertInto('plan_sheet')
    .values({
      site_id: content.siteId,
      plan_id: content.planId,
      plan_version: content.planVersion,
      paper: content.paper,
      content_hash: content.contentHash,
      requested_by: asked.by,
      requested_at: asked.at,
      next_attempt_at: asked.at,
    })
    .onConflict((conflict) =>
      conflict
        .columns(['site_id', 'plan_id', 'plan_version', 'paper', 'content_hash'])
        .doUpdateSet({ status: 'queued', attempts: 0, next_attempt_at: asked.at })
        .where('plan_sheet.status', '=', 'failed'),
    )
    .execute();
}

/** A queued sheet, locked until the transaction ends; null when it is made, given up, not due, or in other hands. */
export async function takeQueuedSheet(trx: SiteTransaction, siteId: string, id: string, now: Date): Promise<SheetRecord | null> {
  const row = await sheets(trx, siteId)
    .where('f.id', '=', id)
    .where('f.status', '=', 'queued')
    .where('f.next_attempt_at', '<=', now)
    .forUpdate()
    .skipLocked()
    .executeTakeFirst();
  return row ? toSheet(row) : null;
}

export async function storeSheet(trx: SiteTransaction, siteId: string, id: string, bytes: Buffer, now: Date): Promise<void> {
  await trx
    .updateTable('plan_sheet')
    .set({ status: 'done', bytes, finished_at: now, last_error: '' })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute();
}

/** Puts the sheet back for `nextAttemptAt`, or gives it up when there is none. */
export async function recordSheetFailure(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  failure: { readonly error: string; readonly nextAttemptAt: Date | null },
): Promise<void> {
  await trx
    .updateTable('plan_sheet')
    .set((eb) => ({
      attempts: eb('attempts', '+', 1),
      last_error: failure.error.slice(0, 500),
      ...(failure.nextAttemptAt ? { next_attempt_at: failure.nextAttemptAt } : { status: 'failed' }),
    }))
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute();
}

export async function readSheetBytes(trx: SiteTransaction, siteId: string, id: string): Promise<Buffer | null> {
  const row = await trx
    .selectFrom('plan_sheet')
    .select('bytes')
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .executeTakeFirst();
  return row?.bytes ?? null;
}
