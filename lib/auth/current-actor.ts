import { getServerSession } from 'next-auth/next';
import { headers } from 'next/headers';
import { redirect } from 'next/navigation';
import { cache } from 'react';
import type { UserActor } from '@/lib/domain/access';
import { loadUserActor } from '@/lib/services/session/load-user-actor';
import { authOptions } from './auth-options';

/**
 * The only reader of a session. The cookie is a claim; the account it names is read again, so that a disabled
 * person, a changed role or "sign out everywhere" counts from the next request on.
 */
export const currentActor = cache(async (): Promise<UserActor | null> => {
  const session = await getServerSession(authOptions);
  return session?.claims ? loadUserActor(session.claims) : null;
});

/** For pages: the actor, or the sign-in page and back to where the person was. */
export async function requireActor(): Promise<UserActor> {
  const actor = await currentActor();
  if (actor) return actor;
  const path = (await headers()).get('x-selvedge-path');
  redirect(path ? `/sign-in?callbackUrl=${encodeURIComponent(path)}` : '/sign-in');
}
