import { inTransaction } from '@/db/client';
import { findPerson } from '@/db/queries/app-user/read-people';
import { endSessions } from '@/db/queries/app-user/write-people';
import { authorise } from '@/lib/domain/access';
import { parseInput } from '@/lib/schemas/parse-input';
import { personIdSchema } from '@/lib/schemas/people/person';
import { recordAudit } from '../audit/record-audit';
import type { ServiceContext } from '../context';

/** Ends every session of a person, for a lost tablet or a shared screen. */
export async function signOutPerson(context: ServiceContext, input: { readonly id: string }): Promise<void> {
  const { actor } = context;
  const { id } = parseInput(personIdSchema, input);
  await inTransaction(actor.siteId, async (trx) => {
    authorise(actor, 'person.sign-out', await findPerson(trx, actor.siteId, id));
    await endSessions(trx, actor.siteId, id);
    await recordAudit(trx, context, {
      action: 'person.sign-out',
      subjectType: 'person',
      subjectId: id,
      fields: ['sessionEpoch'],
    });
  });
}
