import type { SiteTransaction } from '@/db/client';
import { clearStale, findInputHash, insertCheck, lockBookingState, writeCheckedState } from '@/db/queries/pre-check/check-results';
import { preCheck } from '@/lib/domain/pre-check/pre-check';
import { ENGINE_VERSION } from '@/lib/physics';
import { inputHash } from '../check/input-hash';
import { roundAnswer } from '../check/round-answer';
import { readQuestion } from './read-question';

export type Checked = 'checked' | 'unchanged' | 'gone';

/**
 * Checks one booking in one transaction. The state's row is locked before anything is read, so a change that comes
 * meanwhile is checked after this one. Asked again with nothing changed, it writes no second result.
 */
export async function checkBooking(trx: SiteTransaction, siteId: string, bookingId: string, now: Date): Promise<Checked> {
  const state = await lockBookingState(trx, siteId, bookingId);
  if (!state) return 'gone';
  // Another worker was faster.
  if (!state.stale && state.checkNumber > 0) return 'unchanged';
  const setup = await readQuestion(trx, siteId, bookingId);
  if (!setup) return 'gone';
  const hash = inputHash({ engine: ENGINE_VERSION, ...setup.question });
  if (state.checkNumber > 0 && (await findInputHash(trx, siteId, bookingId, state.checkNumber)) === hash) {
    await clearStale(trx, siteId, bookingId);
    return 'unchanged';
  }
  const answer = roundAnswer({ schemaVersion: 1, ...preCheck(setup.question) }) as Parameters<typeof insertCheck>[1]['document'];
  const check = {
    siteId, bookingId, now,
    number: state.checkNumber + 1,
    document: answer,
    engineVersion: ENGINE_VERSION,
    policyVersion: setup.policyVersion,
    inputHash: hash,
  };
  await insertCheck(trx, check);
  await writeCheckedState(trx, check, state.result !== answer.result);
  return 'checked';
}
