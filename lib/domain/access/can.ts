import { ServiceError } from '../errors/service-error';
import type { Actor } from './actor';
import { PERMISSIONS, type Action } from './permissions';
import type { Scope } from './scope';

/** What is acted on. A stored row is passed as it was loaded, so the site is the row's and not the client's word. */
export interface Subject {
  readonly siteId: string;
  /** The row's own id: what a link must point at. */
  readonly id?: string;
  /** The account it belongs to, for actions on one's own account. */
  readonly ownerId?: string;
}

/**
 * May this actor do this to this subject? The site must match first, whatever the role, so that no role
 * anywhere reaches into another site.
 */
export function can(actor: Actor, action: Action, subject: Subject): boolean {
  if (!actor.siteId || actor.siteId !== subject.siteId) return false;
  const permission = PERMISSIONS[action];
  switch (actor.kind) {
    case 'user':
      if (permission.self && subject.ownerId !== actor.userId) return false;
      return permission.roles.some((role) => actor.roles.includes(role));
    case 'token':
      return permission.scope !== undefined && (actor.scopes as readonly Scope[]).includes(permission.scope);
    case 'link':
      return permission.link === true && subject.id === actor.subjectId;
    case 'system':
      return permission.system === true;
  }
}

/** For navigation and buttons: could the actor do this to something of their own site? Courtesy only, never a lock. */
export function mayAttempt(actor: Actor, action: Action): boolean {
  return can(actor, action, {
    siteId: actor.siteId,
    id: actor.kind === 'link' ? actor.subjectId : undefined,
    ownerId: actor.userId ?? undefined,
  });
}

/**
 * The lock at the top of every use-case. Pass the loaded row, or null when nothing was found: both the missing
 * and the forbidden end in the same error, so nobody learns which ids exist.
 * For an action on the site as a whole leave the subject out.
 */
export function authorise<S extends Subject>(actor: Actor, action: Action, subject: S | null | undefined): asserts subject is S;
export function authorise(actor: Actor, action: Action): void;
export function authorise(actor: Actor, action: Action, ...rest: [(Subject | null)?]): void {
  const subject = rest.length === 0 ? { siteId: actor.siteId, ownerId: actor.userId ?? undefined } : rest[0];
  if (!subject || !can(actor, action, subject)) throw new ServiceError('not-found');
}
