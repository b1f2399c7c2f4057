import type { ActionResult } from '@/lib/schemas/action-result';
import type { ServiceContext } from '@/lib/services/context';
import { currentActor } from '@/lib/auth/current-actor';
import { ServiceError } from '@/lib/domain/errors';
import { randomUUID } from 'node:crypto';
import { unstable_rethrow } from 'next/navigation';
import { toErrorView } from './error-view';

/**
 * The body of every server action of a signed-in person. What is expected comes back as data, so the form keeps
 * what was typed and shows each message beside its control; Next's own redirects pass through.
 */
export async function runAction<T>(
  where: string,
  work: (context: ServiceContext) => Promise<T>,
): Promise<ActionResult<T>> {
  return runPublicAction(where, async () => {
    const actor = await currentActor();
    if (!actor) throw new ServiceError('unauthenticated', { message: 'You have been signed out. Sign in again.' });
    return work({ actor, requestId: randomUUID() });
  });
}

/** The same for pages that need no account. */
export async function runPublicAction<T>(where: string, work: () => Promise<T>): Promise<ActionResult<T>> {
  try {
    return { ok: true, data: await work() };
  } catch (error) {
    unstable_rethrow(error);
    return { ok: false, error: toErrorView(error, where) };
  }
}
