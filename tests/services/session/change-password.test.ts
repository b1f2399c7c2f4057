import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { changePassword } from '@/lib/services/session/change-password';
import { loadUserActor } from '@/lib/services/session/load-user-actor';
import { verifySignIn } from '@/lib/services/session/verify-sign-in';
import { createTestSite } from '@/tests/support/database';
import { activePerson, auditActions, outcomeOf, PASSWORD, readAccount, refusingHasher } from '@/tests/support/database/accounts';

const NEW = 'shuttle over the reed';
const input = (currentPassword: string, newPassword = NEW) => ({ currentPassword, newPassword, repeatPassword: newPassword });

describe('changePassword', () => {
  it('replaces the password and ends every session', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'radiologist');
    await changePassword({ actor: person }, input(PASSWORD));
    expect(await loadUserActor({ ...person, sessionEpoch: 1 })).toBeNull();
    await verifySignIn({ email: person.email, password: NEW, address: randomUUID() });
    expect(await outcomeOf(verifySignIn({ email: person.email, password: PASSWORD, address: randomUUID() }))).toMatch(/^unauth/);
    expect(await auditActions(site, person.userId)).toEqual(['account.change-password', 'account.sign-in']);
  });

  it('wants the present password, and slows guessing at an open screen down', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'radiologist');
    const before = await readAccount(site, person.userId);
    const passwords = refusingHasher();
    for (let n = 1; n <= 5; n++) {
      expect(await outcomeOf(changePassword({ actor: person }, input('a wrong guess'), passwords))).toMatch(/^invalid \|.*currentPassword/);
    }
    expect(await outcomeOf(changePassword({ actor: person }, input(PASSWORD), passwords))).toMatch(/^too-many/);
    expect(passwords.verifications).toBe(5);
    expect(await readAccount(site, person.userId)).toEqual(before);
  });

  it('refuses the same password again and one made of the own name', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'radiologist');
    expect(await outcomeOf(changePassword({ actor: person }, input(PASSWORD, PASSWORD)))).toMatch(/newPassword.*now/);
    expect(await outcomeOf(changePassword({ actor: person }, input(PASSWORD, person.displayName)))).toMatch(/newPassword/);
    await changePassword({ actor: person }, input(PASSWORD));
  });
});
