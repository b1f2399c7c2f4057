import { randomUUID } from 'node:crypto';
import { inTransaction } from '@/db/client';
import { insertDemonstration, putScene } from '@/db/queries/demonstration/demonstrations';
import { authorise } from '@/lib/domain/access';
import { captureCase } from '@/lib/domain/demonstration/capture';
import type { SceneDocument } from '@/lib/domain/demonstration/scene';
import { findSetPiece } from '@/lib/domain/demonstration/set-pieces';
import { invalidField, ServiceError } from '@/lib/domain/errors';
import { type CreateDemonstrationInput, createDemonstrationInput } from '@/lib/schemas/demonstration';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import type { ServiceContext } from '../context';

/** Stores a new demonstration with these scenes; the caller has parsed and authorised. */
export async function storeDemonstration(
  context: ServiceContext,
  title: string,
  scenes: readonly SceneDocument[],
): Promise<{ id: string }> {
  const { actor } = context;
  if (actor.kind !== 'user') throw new ServiceError('not-found');
  return inTransaction(actor.siteId, async (trx) => {
    const id = await insertDemonstration(trx, { siteId: actor.siteId, title, createdBy: actor.userId });
    for (const [position, document] of scenes.entries()) {
      await putScene(trx, { siteId: actor.siteId, demonstrationId: id, id: randomUUID(), position }, document);
    }
    await recordAudit(trx, context, {
      action: 'demonstration.edit',
      subjectType: 'demonstration',
      subjectId: id,
      fields: scenes.length > 0 ? ['title', 'scenes'] : ['title'],
    });
    return { id };
  });
}

/** An empty demonstration, one that begins with a scene from the bench, or a copy of a set piece. What could be one person's is taken out of the scene. */
export async function createDemonstration(context: ServiceContext, input: CreateDemonstrationInput): Promise<{ id: string }> {
  authorise(context.actor, 'demonstration.edit');
  const { title, setPiece, scene } = parseInput(createDemonstrationInput, input);
  const piece = setPiece === undefined ? undefined : findSetPiece(setPiece);
  if (setPiece !== undefined && !piece) throw invalidField('setPiece', `“${setPiece}” given; allowed: a set piece of the list`);
  const first = scene ? [{ ...scene, question: captureCase(scene.question) }] : [];
  return storeDemonstration(context, title, piece?.scenes() ?? first);
}
