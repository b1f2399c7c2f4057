import type { Database } from '@/db/client';
import { inTransaction } from '@/db/client';
import { recordSheetFailure, storeSheet, takeQueuedSheet } from '@/db/queries/plan-sheet/plan-sheets';
import { authorise, systemActor } from '@/lib/domain/access';
import { SHEET_MAX_BYTES, type Paper } from '@/lib/domain/plan/sheet';
import type { JobPayload } from '@/lib/jobs';
import { contentOf, readSheetSource, type SheetSource } from './sheet-content';

/** Paints one page; the worker hands it in, because painting needs what no use-case may know. */
export type PaintSheet = (source: SheetSource, paper: Paper) => Promise<{ readonly bytes: Uint8Array; readonly pages: number }>;

export type SheetMaking = 'made' | 'put back' | 'given up' | 'nothing to do';

/** Painting fails for good or not at all; a full disk or a lost connection deserves another try. */
const RETRY_SECONDS = [5, 30, 120] as const;

/**
 * Makes one queued sheet. Its row stays locked meanwhile, so two workers never make it at once; a worker that dies lets
 * the lock go and the sheet is made again, from the same content or not at all.
 */
export async function makeSheet(
  { siteId, sheetId }: JobPayload<'make-plan-sheet'>,
  paint: PaintSheet,
  options: { readonly now?: Date; readonly db?: Database } = {},
): Promise<SheetMaking> {
  const now = options.now ?? new Date();
  return inTransaction(
    siteId,
    async (trx) => {
      const sheet = await takeQueuedSheet(trx, siteId, sheetId, now);
      if (!sheet) return 'nothing to do';
      authorise(systemActor(siteId, 'make-plan-sheet'), 'plan.render', sheet);
      const giveUp = async (error: string): Promise<SheetMaking> => {
        await recordSheetFailure(trx, siteId, sheetId, { error, nextAttemptAt: null });
        return 'given up';
      };
      const source = await readSheetSource(trx, { siteId, planId: sheet.planId, version: sheet.planVersion });
      // Signed off or taken back since it was asked for: what would be printed is not what was asked.
      if (!source || contentOf(siteId, source, sheet.paper).contentHash !== sheet.contentHash) {
        return giveUp('The plan has moved on since this sheet was asked for.');
      }
      try {
        const { bytes, pages } = await paint(source, sheet.paper);
        if (pages !== 1) return giveUp(`The sheet came out on ${pages} pages; allowed: one.`);
        if (bytes.length > SHEET_MAX_BYTES) return giveUp(`The sheet takes ${bytes.length} bytes; allowed: ${SHEET_MAX_BYTES}.`);
        await storeSheet(trx, siteId, sheetId, Buffer.from(bytes), now);
        return 'made';
      } catch (cause) {
        const seconds = RETRY_SECONDS[sheet.attempts];
        const nextAttemptAt = seconds === undefined ? null : new Date(now.getTime() + seconds * 1000);
        await recordSheetFailure(trx, siteId, sheetId, { error: String((cause as Error).message ?? cause), nextAttemptAt });
        return nextAttemptAt ? 'put back' : 'given up';
      }
    },
    options.db,
  );
}
