import { randomUUID } from 'node:crypto';
import { inTransaction } from '@/db/client';
import { insertDemonstration, putScene } from '@/db/queries/demonstration/demonstrations';
import { authorise } from '@/lib/domain/access';
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

/** An empty demonstration, or a copy of a set piece. */
export async function createDemonstration(context: ServiceContext, input: CreateDemonstrationInput): Promise<{ id: string }> {
  authorise(context.actor, 'demonstration.edit');
  const { title, setPiece } = parseInput(createDemonstrationInput, input);
  const piece = setPiece === undefined ? undefined : findSetPiece(setPiece);
  if (setPiece !== undefined && !piece) throw invalidField('setPiece', `“${setPiece}” given; allowed: a set piece of the list`);
  return storeDemonstration(context, title, piece?.scenes() ?? []);
}
