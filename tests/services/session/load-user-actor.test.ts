import { describe, expect, it } from 'vitest';
import { loadUserActor } from '@/lib/services/session/load-user-actor';
import { signOutEverywhere } from '@/lib/services/session/sign-out-everywhere';
import { createTestSite } from '@/tests/support/database';
import { activePerson, auditActions, changeAccount, outcomeOf } from '@/tests/support/database/accounts';

const claims = (person: { siteId: string; userId: string }, sessionEpoch = 1) => ({
  siteId: person.siteId,
  userId: person.userId,
  sessionEpoch,
});

describe('loadUserActor', () => {
  it('reads the person as they are now', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'radiographer');
    expect(await loadUserActor(claims(person))).toMatchObject({ kind: 'user', userId: person.userId, roles: ['radiographer'] });
    await changeAccount(site, person.userId, { roles: ['lead', 'invented-role'] });
    expect(await loadUserActor(claims(person))).toMatchObject({ roles: ['lead'] });
  });

  it('refuses a session from before, and one from after', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    await changeAccount(site, person.userId, { session_epoch: 3 });
    expect(await loadUserActor(claims(person, 2))).toBeNull();
    expect(await loadUserActor(claims(person, 4))).toBeNull();
    expect(await loadUserActor(claims(person, 3))).not.toBeNull();
  });

  it('refuses a disabled person, until enabled again', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    await changeAccount(site, person.userId, { disabled_at: new Date() });
    expect(await loadUserActor(claims(person))).toBeNull();
    await changeAccount(site, person.userId, { disabled_at: null });
    expect(await loadUserActor(claims(person))).not.toBeNull();
  });

  it('does not find a person of one site in another', async () => {
    const [one, two] = [await createTestSite(), await createTestSite()];
    const person = await activePerson(one, 'lead');
    expect(await loadUserActor({ ...claims(person), siteId: two.siteId })).toBeNull();
    expect(await loadUserActor(claims(person))).not.toBeNull();
  });
});

describe('signOutEverywhere', () => {
  it('ends every session of the actor and of nobody else', async () => {
    const site = await createTestSite();
    const [person, other] = [await activePerson(site, 'educator'), await activePerson(site, 'educator')];
    await signOutEverywhere({ actor: person });
    expect(await loadUserActor(claims(person))).toBeNull();
    expect(await loadUserActor(claims(person, 2))).not.toBeNull();
    expect(await loadUserActor(claims(other))).not.toBeNull();
    expect(await auditActions(site, person.userId)).toEqual(['account.sign-out-everywhere']);
  });

  it('is not for tokens', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    const token = { kind: 'token', siteId: site.siteId, userId: person.userId, tokenId: person.userId, roles: [], scopes: ['plans:write'] } as const;
    expect(await outcomeOf(signOutEverywhere({ actor: token }))).toMatch(/^not-found/);
    expect(await loadUserActor(claims(person))).not.toBeNull();
  });
});
