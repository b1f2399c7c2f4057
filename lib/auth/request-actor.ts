import type { Actor } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { requireSameOrigin } from '@/lib/http/same-origin';
import { resolveTokenActor } from '@/lib/services/session/resolve-token-actor';
import { currentActor } from './current-actor';

const BEARER = /^Bearer ([\x21-\x7e]{1,200})$/i;
const NEITHER = 'Sign in, or send an API token in the Authorization header.';
const READING = new Set(['GET', 'HEAD']);

/**
 * Who makes this request: the token it shows, else the session it carries. A request that shows a token is
 * judged by the token alone; a wrong one never falls back to a cookie.
 */
export async function requestActor(request: Request): Promise<Actor> {
  const authorization = request.headers.get('authorization');
  if (authorization !== null) {
    const secret = BEARER.exec(authorization)?.[1];
    const actor = secret ? await resolveTokenActor(secret) : null;
    if (!actor) throw new ServiceError('unauthenticated', { message: 'This token is not valid.' });
    return actor;
  }
  // A machine that forgot its token should hear that, and not about origins.
  if (!request.headers.get('cookie')) throw new ServiceError('unauthenticated', { message: NEITHER });
  if (!READING.has(request.method)) requireSameOrigin(request.headers);
  const actor = await currentActor();
  if (!actor) throw new ServiceError('unauthenticated');
  return actor;
}
