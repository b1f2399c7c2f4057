import { randomUUID } from 'node:crypto';
import { inTransaction } from '@/db/client';
import { changeDemonstration, findDemonstration, listScenes, putScene } from '@/db/queries/demonstration/demonstrations';
import { authorise } from '@/lib/domain/access';
import { captureCase } from '@/lib/domain/demonstration/capture';
import { SCENES_MAX } from '@/lib/domain/demonstration/scene';
import { ServiceError } from '@/lib/domain/errors';
import { type AddSceneInput, addSceneInput } from '@/lib/schemas/demonstration';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';

/** A scene taken from the bench, at the end. What could be one person's is taken out here too, whoever sends it. */
export async function addScene(context: ServiceContext, input: AddSceneInput): Promise<{ id: string; title: string }> {
  const { actor } = context;
  const { demonstrationId, scene } = parseInput(addSceneInput, input);
  return inTransaction(actor.siteId, async (trx) => {
    const found = await findDemonstration(trx, actor.siteId, demonstrationId, { forUpdate: true });
    authorise(actor, 'demonstration.edit', found);
    const position = (await listScenes(trx, actor.siteId, demonstrationId)).length;
    if (position >= SCENES_MAX) {
      throw new ServiceError('invalid', { message: `“${found.title}” has ${position} scenes; allowed: up to ${SCENES_MAX}. Take one out first.` });
    }
    const id = randomUUID();
    await putScene(trx, { siteId: actor.siteId, demonstrationId, id, position }, { ...scene, question: captureCase(scene.question) });
    await changeDemonstration(trx, found, found.title, nowOf(context));
    await recordAudit(trx, context, {
      action: 'demonstration.edit',
      subjectType: 'demonstration',
      subjectId: demonstrationId,
      fields: ['scenes'],
    });
    return { id, title: found.title };
  });
}
