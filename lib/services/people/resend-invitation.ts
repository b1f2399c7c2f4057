import { inTransaction } from '@/db/client';
import { findPerson } from '@/db/queries/app-user/read-people';
import { voidOneTimeTokens } from '@/db/queries/one-time-token/one-time-tokens';
import { authorise } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { parseInput } from '@/lib/schemas/parse-input';
import { personIdSchema } from '@/lib/schemas/people/person';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { queuePasswordLink } from '../session/password-link';

/** Mails the invitation again; the link of the earlier mail stops working. */
export async function resendInvitation(context: ServiceContext, input: { readonly id: string }): Promise<void> {
  const { actor } = context;
  const { id } = parseInput(personIdSchema, input);
  const now = nowOf(context);
  await inTransaction(actor.siteId, async (trx) => {
    const person = await findPerson(trx, actor.siteId, id, { lock: true });
    authorise(actor, 'person.invite', person);
    if (person.status !== 'invited') {
      throw new ServiceError('conflict', { message: `${person.displayName} is ${person.status}, not invited.` });
    }
    await voidOneTimeTokens(trx, actor.siteId, id, 'set-password', now);
    await queuePasswordLink(trx, { siteId: actor.siteId, userId: id, purpose: 'invitation' }, now);
    await recordAudit(trx, context, { action: 'person.invite', subjectType: 'person', subjectId: id, fields: [] });
  });
}
