import type { Database } from '@/db/client';
import { inTransaction } from '@/db/client';
import { recordHandOutFailure, storeHandOut, takeQueuedHandOut } from '@/db/queries/demonstration/hand-outs';
import { authorise, systemActor } from '@/lib/domain/access';
import { type HandOut, HAND_OUT_MAX_BYTES } from '@/lib/domain/demonstration/hand-out';
import type { Paper } from '@/lib/domain/plan/sheet';
import type { JobPayload } from '@/lib/jobs';
import { handOutContent, readHandOut } from './hand-out-content';

/** Paints all pages; the worker hands it in, because painting needs what no use-case may know. */
export type PaintHandOut = (printed: HandOut, paper: Paper) => Promise<{ readonly bytes: Uint8Array; readonly pages: number }>;

export type HandOutMaking = 'made' | 'put back' | 'given up' | 'nothing to do';

/** Painting fails for good or not at all; a full disk or a lost connection deserves another try. */
const RETRY_SECONDS = [5, 30, 120] as const;

/**
 * Makes one queued hand-out. Its row stays locked meanwhile, so two workers never make it at once; a worker that dies
 * lets the lock go and it is made again, from the same content or not at all.
 */
export async function makeHandOut(
  { siteId, handOutId }: JobPayload<'make-hand-out'>,
  paint: PaintHandOut,
  options: { readonly now?: Date; readonly db?: Database } = {},
): Promise<HandOutMaking> {
  const now = options.now ?? new Date();
  return inTransaction(
    siteId,
    async (trx) => {
      const asked = await takeQueuedHandOut(trx, siteId, handOutId, now);
      if (!asked) return 'nothing to do';
      authorise(systemActor(siteId, 'make-hand-out'), 'demonstration.render', asked);
      const giveUp = async (error: string): Promise<HandOutMaking> => {
        await recordHandOutFailure(trx, siteId, handOutId, { error, nextAttemptAt: null });
        return 'given up';
      };
      const printed = await readHandOut(trx, siteId, asked.demonstrationId);
      // Changed or put away since it was asked for: what would be printed is not what was asked.
      if (!printed || handOutContent(asked, printed, asked.paper).contentHash !== asked.contentHash) {
        return giveUp('The demonstration has changed since this hand-out was asked for.');
      }
      try {
        const { bytes, pages } = await paint(printed, asked.paper);
        if (pages !== printed.scenes.length) return giveUp(`The hand-out came out on ${pages} pages; allowed: one a scene, ${printed.scenes.length}.`);
        if (bytes.length > HAND_OUT_MAX_BYTES) return giveUp(`The hand-out takes ${bytes.length} bytes; allowed: ${HAND_OUT_MAX_BYTES}.`);
        await storeHandOut(trx, siteId, handOutId, Buffer.from(bytes), now);
        return 'made';
      } catch (cause) {
        const seconds = RETRY_SECONDS[asked.attempts];
        const nextAttemptAt = seconds === undefined ? null : new Date(now.getTime() + seconds * 1000);
        await recordHandOutFailure(trx, siteId, handOutId, { error: String((cause as Error).message ?? cause), nextAttemptAt });
        return nextAttemptAt ? 'put back' : 'given up';
      }
    },
    options.db,
  );
}
