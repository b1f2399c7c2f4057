import { notFound } from 'next/navigation';
import { randomUUID } from 'node:crypto';
import { requireActor } from '@/lib/auth/current-actor';
import type { UserActor } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import type { ServiceContext } from '@/lib/services/context';

/**
 * What a page of the workspace starts with: sign-in when there is no session, and our own 404 both for what is
 * missing and for what is not the reader's to see.
 */
export async function loadPage<T>(
  work: (context: ServiceContext & { readonly actor: UserActor }) => Promise<T>,
): Promise<T & {}> {
  const actor = await requireActor();
  try {
    return (await work({ actor, requestId: randomUUID() }))!;
  } catch (error) {
    // An id in the address that is no id names nothing.
    if (error instanceof ServiceError && (error.code === 'not-found' || error.code === 'invalid')) notFound();
    throw error;
  }
}
