import { describe, expect, it } from 'vitest';
import {
  ACTIONS,
  PERMISSIONS,
  ROLES,
  SCOPES,
  authorise,
  can,
  linkActor,
  mayAttempt,
  normaliseRoles,
  systemActor,
  type Action,
  type Role,
  type Scope,
  type TokenActor,
  type UserActor,
} from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';

const SITE = '11111111-1111-4111-8111-111111111111';
const OTHER_SITE = '22222222-2222-4222-8222-222222222222';
const USER = '33333333-3333-4333-8333-333333333333';
const OTHER_USER = '44444444-4444-4444-8444-444444444444';

function user(...roles: Role[]): UserActor {
  return { kind: 'user', siteId: SITE, userId: USER, displayName: 'A. Tester', roles };
}
function token(...scopes: Scope[]): TokenActor {
  return { kind: 'token', siteId: SITE, userId: USER, tokenId: OTHER_USER, roles: [], scopes };
}
const here = { siteId: SITE, ownerId: USER };

describe('the permission table', () => {
  it('names every action noun.verb and describes it', () => {
    for (const action of ACTIONS) {
      expect(action).toMatch(/^[a-z]+(-[a-z]+)*\.[a-z]+(-[a-z]+)*$/);
      expect(PERMISSIONS[action].description.length).toBeGreaterThan(5);
    }
  });

  it('leaves no action that nobody can ever do', () => {
    for (const action of ACTIONS) {
      const p = PERMISSIONS[action];
      expect(p.roles.length > 0 || p.system === true || p.link === true, action).toBe(true);
    }
  });

  it('gives every scope something to do', () => {
    for (const scope of SCOPES) expect(ACTIONS.some((a) => PERMISSIONS[a].scope === scope), scope).toBe(true);
  });

  it('keeps people, tokens, policy and the audit log with leads, and away from tokens', () => {
    const leadOnly = ACTIONS.filter((a) => /^(person|api-token|audit)\./.test(a) || a === 'policy.edit');
    expect(leadOnly.length).toBeGreaterThan(8);
    for (const action of leadOnly) {
      expect(PERMISSIONS[action].roles, action).toEqual(['lead']);
      expect(PERMISSIONS[action].scope, action).toBeUndefined();
    }
  });

  it('lets only a radiologist sign off, and no token', () => {
    for (const role of ROLES) expect(can(user(role), 'plan.sign-off', here)).toBe(role === 'radiologist');
    expect(can(token(...SCOPES), 'plan.sign-off', here)).toBe(false);
  });
});

describe('can', () => {
  it('refuses another site to every kind of actor and every action, and does not refuse the own one', () => {
    const everyone = [user(...ROLES), token(...SCOPES), linkActor(SITE, USER), systemActor(SITE, 'pre-check')];
    for (const actor of everyone) {
      let allowedAtHome = 0;
      for (const action of ACTIONS) {
        expect(can(actor, action, { siteId: OTHER_SITE, id: USER, ownerId: USER }), action).toBe(false);
        if (can(actor, action, { siteId: SITE, id: USER, ownerId: USER })) allowedAtHome += 1;
      }
      expect(allowedAtHome, actor.kind).toBeGreaterThan(0);
    }
  });

  it('refuses an actor whose site is empty, even to a subject without a site', () => {
    expect(can({ ...user('lead'), siteId: '' }, 'person.read', { siteId: '' })).toBe(false);
  });

  it('refuses a person without roles everything', () => {
    for (const action of ACTIONS) expect(can(user(), action, here), action).toBe(false);
  });

  it('adds up the roles of one person', () => {
    expect(can(user('educator'), 'booking.import', here)).toBe(false);
    expect(can(user('educator', 'coordinator'), 'booking.import', here)).toBe(true);
    expect(can(user('educator', 'coordinator'), 'demonstration.edit', here)).toBe(true);
  });

  it('keeps account actions to the own account, leads included', () => {
    const actions = ACTIONS.filter((a) => PERMISSIONS[a].self);
    expect(actions.length).toBeGreaterThan(0);
    for (const action of actions) {
      expect(can(user('lead'), action, { siteId: SITE, ownerId: OTHER_USER })).toBe(false);
      expect(can(user('lead'), action, { siteId: SITE })).toBe(false);
      expect(can(user('educator'), action, here)).toBe(true);
    }
  });

  it('gives a token exactly its scopes', () => {
    for (const action of ACTIONS) {
      const scope = PERMISSIONS[action].scope;
      expect(can(token(...SCOPES), action, here), action).toBe(scope !== undefined);
      if (scope) expect(can(token(...SCOPES.filter((s) => s !== scope)), action, here), action).toBe(false);
    }
  });

  it('lets a link reach its own subject and no other', () => {
    const actor = linkActor(SITE, 'a');
    expect(can(actor, 'size-request.answer', { siteId: SITE, id: 'a' })).toBe(true);
    expect(can(actor, 'size-request.answer', { siteId: SITE, id: 'b' })).toBe(false);
    expect(can(actor, 'size-request.answer', { siteId: SITE })).toBe(false);
    expect(can(actor, 'booking.read', { siteId: SITE, id: 'a' })).toBe(false);
  });

  it('does not let the worker sign plans off or touch people', () => {
    for (const action of ['plan.sign-off', 'person.invite', 'policy.edit'] satisfies Action[]) {
      expect(can(systemActor(SITE, 'pre-check'), action, here)).toBe(false);
    }
  });
});

describe('authorise', () => {
  it('makes the missing and the forbidden look alike', () => {
    const outcomes = [
      () => authorise(user('lead'), 'person.read', null),
      () => authorise(user('lead'), 'person.read', undefined),
      () => authorise(user('lead'), 'person.read', { siteId: OTHER_SITE }),
      () => authorise(user('radiographer'), 'person.read', { siteId: SITE }),
      () => authorise(user('radiographer'), 'person.read'),
    ].map((attempt) => {
      try {
        attempt();
        return 'allowed';
      } catch (error) {
        return error instanceof ServiceError ? `${error.code} ${error.message}` : error;
      }
    });
    expect(new Set(outcomes).size).toBe(1);
    expect(outcomes[0]).toMatch(/^not-found /);
  });

  it('lets the allowed through', () => {
    expect(() => authorise(user('lead'), 'person.read')).not.toThrow();
    expect(() => authorise(user('lead'), 'person.read', { siteId: SITE })).not.toThrow();
    expect(() => authorise(user('educator'), 'account.read')).not.toThrow();
  });
});

it('normaliseRoles sorts and removes doubles', () => {
  expect(normaliseRoles(['educator', 'lead', 'educator'])).toEqual(['lead', 'educator']);
});

it('mayAttempt follows the table', () => {
  expect(mayAttempt(user('lead'), 'audit.read')).toBe(true);
  expect(mayAttempt(user('coordinator'), 'audit.read')).toBe(false);
  expect(mayAttempt(linkActor(SITE, 'a'), 'demonstration.view')).toBe(true);
});
