import { notFound } from 'next/navigation';
import { randomUUID } from 'node:crypto';
import { requireActor } from '@/lib/auth/current-actor';
import type { UserActor } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import type { ServiceContext } from '@/lib/services/context';

/** PostgreSQL's invalid_text_representation and character_not_in_repertoire: of what a page asks for, only ids that are none are refused so. */
const NO_ID: readonly unknown[] = ['22P02', '22021'];

function namesNothing(error: unknown): boolean {
  if (error instanceof ServiceError) return error.code === 'not-found' || error.code === 'invalid';
  return error instanceof Error && NO_ID.includes((error as { code?: unknown }).code);
}

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
    if (namesNothing(error)) notFound();
    throw error;
  }
}
