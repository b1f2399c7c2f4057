import { inTransaction } from '@/db/client';
import { findPersonByEmail } from '@/db/queries/app-user/read-people';
import { insertPerson } from '@/db/queries/app-user/write-people';
import { authorise, normaliseRoles } from '@/lib/domain/access';
import { invalidField } from '@/lib/domain/errors';
import { parseInput } from '@/lib/schemas/parse-input';
import { type InvitePersonInput, invitePersonSchema } from '@/lib/schemas/people/person';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { queuePasswordLink } from '../session/password-link';

/** PostgreSQL's unique_violation. */
const TAKEN = '23505';

/**
 * Makes an account without a password and mails its owner a link to choose one, in one transaction.
 * An address belongs to one site only; that it is taken at another site is said in words that fit other reasons too.
 */
export async function invitePerson(context: ServiceContext, input: InvitePersonInput): Promise<{ id: string }> {
  const { actor } = context;
  authorise(actor, 'person.invite');
  const wanted = parseInput(invitePersonSchema, input);
  const { siteId } = actor;
  try {
    return await inTransaction(siteId, async (trx) => {
      const present = await findPersonByEmail(trx, siteId, wanted.email);
      if (present) throw invalidField('email', `${wanted.email} belongs to ${present.displayName}, who is ${present.status}.`);
      const id = await insertPerson(trx, { siteId, ...wanted, roles: normaliseRoles(wanted.roles) });
      await queuePasswordLink(trx, { siteId, userId: id, purpose: 'invitation' }, nowOf(context));
      await recordAudit(trx, context, {
        action: 'person.invite',
        subjectType: 'person',
        subjectId: id,
        fields: ['email', 'displayName', 'roles'],
      });
      return { id };
    });
  } catch (error) {
    if ((error as { code?: unknown }).code !== TAKEN) throw error;
    throw invalidField('email', `${wanted.email} cannot be invited. Ask the person for another address.`);
  }
}
