import type { SiteTransaction } from '@/db/client';
import { listPeople } from '@/db/queries/app-user/read-people';
import { PERMISSIONS, type Action, type Actor } from '@/lib/domain/access';

/** Everyone at work who may do this, but the one who has just acted. */
export async function thoseWhoMay(trx: SiteTransaction, actor: Actor, action: Action): Promise<string[]> {
  const { roles } = PERMISSIONS[action];
  const people = await listPeople(trx, actor.siteId);
  return people
    .filter((person) => person.status === 'active' && person.id !== actor.userId && roles.some((role) => person.roles.includes(role)))
    .map(({ id }) => id);
}
