import type { Role } from './role';
import type { Scope } from './scope';

/** A signed-in person. Roles are read from the database on every request, never from the cookie. */
export interface UserActor {
  readonly kind: 'user';
  readonly siteId: string;
  readonly userId: string;
  readonly displayName: string;
  readonly roles: readonly Role[];
}

/** A machine holding an API token. `userId` is the lead who made it and answers for it. */
export interface TokenActor {
  readonly kind: 'token';
  readonly siteId: string;
  readonly userId: string;
  readonly tokenId: string;
  readonly roles: readonly [];
  readonly scopes: readonly Scope[];
}

/** Someone without an account who holds a link; may touch `subjectId` and nothing else. */
export interface LinkActor {
  readonly kind: 'link';
  readonly siteId: string;
  readonly userId: null;
  readonly subjectId: string;
  readonly roles: readonly [];
}

/** The worker, acting on a queued job for one site. */
export interface SystemActor {
  readonly kind: 'system';
  readonly siteId: string;
  readonly userId: null;
  readonly job: string;
  readonly roles: readonly [];
}

export type Actor = UserActor | TokenActor | LinkActor | SystemActor;

export function systemActor(siteId: string, job: string): SystemActor {
  return { kind: 'system', siteId, userId: null, job, roles: [] };
}

export function linkActor(siteId: string, subjectId: string): LinkActor {
  return { kind: 'link', siteId, userId: null, subjectId, roles: [] };
}

/** Stands for the worker where an id is needed. */
export const NOBODY_ID = '00000000-0000-0000-0000-000000000000';

/** How the audit log names who acted. */
export function actorReference(actor: Actor): { readonly kind: Actor['kind']; readonly id: string } {
  switch (actor.kind) {
    case 'user':
      return { kind: actor.kind, id: actor.userId };
    case 'token':
      return { kind: actor.kind, id: actor.tokenId };
    case 'link':
      return { kind: actor.kind, id: actor.subjectId };
    case 'system':
      return { kind: actor.kind, id: NOBODY_ID };
  }
}
