import { inTransaction, type SiteTransaction } from '@/db/client';
import { changeDemonstration, findDemonstration, findSceneOwners, listScenes, putScene, removeScenes } from '@/db/queries/demonstration/demonstrations';
import { authorise } from '@/lib/domain/access';
import type { Scene } from '@/lib/domain/demonstration/scene';
import { ServiceError, staleVersion } from '@/lib/domain/errors';
import { type SaveDemonstrationInput, saveDemonstrationInput } from '@/lib/schemas/demonstration';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';

/** The whole demonstration as it is now edited. Whoever saves on an older version is told and overwrites nothing. */
export async function saveDemonstration(context: ServiceContext, input: SaveDemonstrationInput): Promise<{ version: number }> {
  const { actor } = context;
  const wanted = parseInput(saveDemonstrationInput, input);
  return inTransaction(actor.siteId, async (trx) => {
    const found = await findDemonstration(trx, actor.siteId, wanted.id, { forUpdate: true });
    authorise(actor, 'demonstration.edit', found);
    if (found.version !== wanted.expectedVersion) throw staleVersion(found.version);
    const fields = await storeScenes(trx, actor.siteId, wanted.id, wanted.scenes);
    if (wanted.title !== found.title) fields.push('title');
    if (fields.length === 0) return { version: found.version };
    const version = await changeDemonstration(trx, found, wanted.title, nowOf(context));
    await recordAudit(trx, context, { action: 'demonstration.edit', subjectType: 'demonstration', subjectId: wanted.id, fields });
    return { version };
  });
}

/** Writes what differs from what is stored. @returns names of what changed */
async function storeScenes(trx: SiteTransaction, siteId: string, demonstrationId: string, scenes: readonly Scene[]): Promise<string[]> {
  const stored = await listScenes(trx, siteId, demonstrationId);
  const owners = await findSceneOwners(trx, siteId, scenes.map(({ id }) => id));
  // An id of another demonstration's scene would move it there: such an id is as good as unknown.
  if ([...owners.values()].some((owner) => owner !== demonstrationId)) throw new ServiceError('not-found');
  const before = new Map(stored.map((scene, position) => [scene.id, JSON.stringify([position, inOrder(scene)])]));
  let changed = false;
  for (const [position, { id, ...document }] of scenes.entries()) {
    if (before.get(id) === JSON.stringify([position, inOrder({ id, ...document })])) continue;
    changed = true;
    await putScene(trx, { siteId, demonstrationId, id, position }, document);
  }
  const kept = new Set(scenes.map(({ id }) => id));
  const gone = stored.filter(({ id }) => !kept.has(id)).map(({ id }) => id);
  await removeScenes(trx, siteId, demonstrationId, gone);
  return changed || gone.length > 0 ? ['scenes'] : [];
}

/** The database gives an object's keys back in an order of its own. */
function inOrder(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(inOrder);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1)).map(([key, each]) => [key, inOrder(each)]));
}
