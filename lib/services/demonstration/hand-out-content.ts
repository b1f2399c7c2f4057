import type { SiteTransaction } from '@/db/client';
import { findDemonstration, listScenes } from '@/db/queries/demonstration/demonstrations';
import type { HandOutContent } from '@/db/queries/demonstration/hand-outs';
import type { HandOut, HandOutRecord } from '@/lib/domain/demonstration/hand-out';
import { withoutPrivateParts } from '@/lib/domain/demonstration/scene';
import type { Paper } from '@/lib/domain/plan/sheet';
import { ENGINE_VERSION } from '@/lib/physics';
import type { HandOutView } from '@/lib/schemas/demonstration';
import { inputHash } from '../check/input-hash';

/** What a hand-out says, now; null when the demonstration is put away. */
export async function readHandOut(trx: SiteTransaction, siteId: string, demonstrationId: string): Promise<HandOut | null> {
  const found = await findDemonstration(trx, siteId, demonstrationId);
  if (!found) return null;
  return { title: found.title, scenes: withoutPrivateParts(await listScenes(trx, siteId, demonstrationId)) };
}

/** The figures on it are the engine's, so another engine makes another file. */
export function handOutContent(where: { readonly siteId: string; readonly demonstrationId: string }, printed: HandOut, paper: Paper): HandOutContent {
  return { ...where, paper, contentHash: inputHash({ printed, engine: ENGINE_VERSION }) };
}

export function toHandOutView({ id, demonstrationId, paper, state, attempts, sizeBytes }: HandOutRecord): HandOutView {
  return { id, demonstrationId, paper, state, attempts, ...(sizeBytes === null ? {} : { sizeBytes }) };
}
