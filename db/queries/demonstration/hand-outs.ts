import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import type { HandOutRecord } from '@/lib/domain/demonstration/hand-out';
import type { Paper, SheetState } from '@/lib/domain/plan/sheet';

/** Everything but the file itself, whose length is enough to show. */
function handOuts(trx: SiteTransaction, siteId: string) {
  return trx
    .selectFrom('demonstration_hand_out as f')
    .select(['f.site_id', 'f.id', 'f.demonstration_id', 'f.paper', 'f.content_hash', 'f.status', 'f.attempts'])
    .select(sql<number | null>`octet_length(f.bytes)`.as('size_bytes'))
    .where('f.site_id', '=', siteId);
}

const toHandOut = (row: Awaited<ReturnType<ReturnType<typeof handOuts>['execute']>>[number]): HandOutRecord => ({
  siteId: row.site_id,
  id: row.id,
  demonstrationId: row.demonstration_id,
  paper: row.paper as Paper,
  contentHash: row.content_hash,
  state: row.status as SheetState,
  attempts: row.attempts,
  sizeBytes: row.size_bytes,
});

export interface HandOutContent {
  readonly siteId: string;
  readonly demonstrationId: string;
  readonly paper: Paper;
  readonly contentHash: string;
}

export async function findHandOut(trx: SiteTransaction, siteId: string, id: string): Promise<HandOutRecord | null> {
  const row = await handOuts(trx, siteId).where('f.id', '=', id).executeTakeFirst();
  return row ? toHandOut(row) : null;
}

/** The file of exactly this content, made or in the making. */
export async function findHandOutOf(trx: SiteTransaction, content: HandOutContent): Promise<HandOutRecord | null> {
  const row = await handOuts(trx, content.siteId)
    .where('f.demonstration_id', '=', content.demonstrationId)
    .where('f.paper', '=', content.paper)
    .where('f.content_hash', '=', content.contentHash)
    .executeTakeFirst();
  return row ? toHandOut(row) : null;
}

/** A place for this content; one that is there already stays as it is, except that a failed one is tried afresh. */
export async function queueHandOut(trx: SiteTransaction, content: HandOutContent, asked: { readonly by: string; readonly at: Date }): Promise<void> {
  await trx
    .insertInto('demonstration_hand_out')
    .values({
      site_id: content.siteId,
      demonstration_id: content.demonstrationId,
      paper: content.paper,
      content_hash: content.contentHash,
      requested_by: asked.by,
      requested_at: asked.at,
      next_attempt_at: asked.at,
    })
    .onConflict((conflict) =>
      conflict
        .columns(['site_id', 'demonstration_id', 'paper', 'content_hash'])
        .doUpdateSet({ status: 'queued', attempts: 0, next_attempt_at: asked.at })
        .where('demonstration_hand_out.status', '=', 'failed'),
    )
    .execute();
}

/** A queued hand-out, locked until the transaction ends; null when it is made, given up, not due, or in other hands. */
export async function takeQueuedHandOut(trx: SiteTransaction, siteId: string, id: string, now: Date): Promise<HandOutRecord | null> {
  const row = await handOuts(trx, siteId)
    .where('f.id', '=', id)
    .where('f.status', '=', 'queued')
    .where('f.next_attempt_at', '<=', now)
    .forUpdate()
    .skipLocked()
    .executeTakeFirst();
  return row ? toHandOut(row) : null;
}

export async function storeHandOut(trx: SiteTransaction, siteId: string, id: string, bytes: Buffer, now: Date): Promise<void> {
  await trx
    .updateTable('demonstration_hand_out')
    .set({ status: 'done', bytes, finished_at: now, last_error: '' })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute();
}

/** Puts the hand-out back for `nextAttemptAt`, or gives it up when there is none. */
export async function recordHandOutFailure(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  failure: { readonly error: string; readonly nextAttemptAt: Date | null },
): Promise<void> {
  await trx
    .updateTable('demonstration_hand_out')
    .set((eb) => ({
      attempts: eb('attempts', '+', 1),
      last_error: failure.error.slice(0, 500),
      ...(failure.nextAttemptAt ? { next_attempt_at: failure.nextAttemptAt } : { status: 'failed' }),
    }))
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute();
}

export async function readHandOutBytes(trx: SiteTransaction, siteId: string, id: string): Promise<Buffer | null> {
  const row = await trx.selectFrom('demonstration_hand_out').select('bytes').where('site_id', '=', siteId).where('id', '=', id).executeTakeFirst();
  return row?.bytes ?? null;
}
