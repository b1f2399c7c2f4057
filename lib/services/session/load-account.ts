import { inTransaction } from '@/db/client';
import { findPerson } from '@/db/queries/app-user/read-people';
import { authorise } from '@/lib/domain/access';
import type { Person } from '@/lib/domain/people';
import type { ServiceContext } from '../context';

/** The actor's own account. */
export async function loadAccount(context: ServiceContext): Promise<Person> {
  const { actor } = context;
  return inTransaction(actor.siteId, async (trx) => {
    const person = actor.userId === null ? null : await findPerson(trx, actor.siteId, actor.userId);
    authorise(actor, 'account.read', person && { ...person, ownerId: person.id });
    return person!;
  });
}
