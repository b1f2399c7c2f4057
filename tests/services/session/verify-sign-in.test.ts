import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { argon2Hasher, UNMATCHABLE_HASH } from '@/lib/services/session/password-hash';
import { verifySignIn } from '@/lib/services/session/verify-sign-in';
import { createTestSite } from '@/tests/support/database';
import { activePerson, auditActions, changeAccount, countingHasher, outcomeOf, PASSWORD, refusingHasher } from '@/tests/support/database/accounts';

const address = () => `test ${randomUUID()}`;

describe('verifySignIn', () => {
  it('lets the right password in, however the address is typed, and logs it', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'radiographer', 'educator');
    const email = `  ${person.email.toUpperCase()} `;
    const account = await verifySignIn({ email, password: PASSWORD, address: address() });
    expect(account).toMatchObject({ siteId: site.siteId, userId: person.userId, sessionEpoch: 1, roles: ['radiographer', 'educator'] });
    expect(await auditActions(site, person.userId)).toEqual(['account.sign-in']);
  });

  it('gives every stranger the same words after the same work', async () => {
    const site = await createTestSite();
    const [known, disabled] = [await activePerson(site, 'lead'), await activePerson(site, 'lead')];
    const invited = await site.person('lead');
    await changeAccount(site, disabled.userId, { disabled_at: new Date() });
    const tries = {
      'wrong password': { email: known.email, password: 'not the password at all' },
      'no such account': { email: `${randomUUID()}@people.example`, password: PASSWORD },
      'disabled, right password': { email: disabled.email, password: PASSWORD },
      'invited, no password yet': { email: `${invited.userId}@people.example`, password: '' },
      'invited, some password': { email: `${invited.userId}@people.example`, password: PASSWORD },
      'not an address': { email: 'lead', password: PASSWORD },
      'NUL in the address': { email: `${known.email}\u0000`, password: PASSWORD },
      'NUL in the password': { email: known.email, password: `${PASSWORD}\u0000` },
      'a megabyte of password': { email: known.email, password: 'x'.repeat(1_000_000) },
      'a very long address': { email: `${'x'.repeat(100_000)}@people.example`, password: PASSWORD },
    };
    const seen: Record<string, string> = {};
    for (const [name, typed] of Object.entries(tries)) {
      const passwords = countingHasher();
      const outcome = await outcomeOf(verifySignIn({ ...typed, address: address() }, passwords));
      seen[name] = `${outcome}, ${passwords.verifications} verification`;
    }
    expect(new Set(Object.values(seen)), JSON.stringify(seen, null, 1)).toEqual(
      new Set(['unauthenticated | E-mail address and password do not belong together., 1 verification']),
    );
    expect(await auditActions(site, known.userId)).toEqual([]);
    // The twin: nothing of this keeps the person out.
    await verifySignIn({ email: known.email, password: PASSWORD, address: address() });
  });

  it('slows an account down after five failures from an address, known or not, and does no work meanwhile', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    for (const email of [person.email, `${randomUUID()}@people.example`]) {
      const from = address();
      const passwords = refusingHasher();
      const attempt = (password: string) => outcomeOf(verifySignIn({ email, password, address: from }, passwords));
      for (let n = 1; n <= 5; n++) expect(await attempt('wrong wrong wrong')).toMatch(/^unauthenticated/);
      expect(passwords.verifications).toBe(5);
      expect(await attempt(PASSWORD)).toMatch(/^too-many/);
      expect(passwords.verifications).toBe(5);
    }
    // The twin: the same person from another address is not held up.
    await verifySignIn({ email: person.email, password: PASSWORD, address: address() });
  });

  it('names how long to wait', async () => {
    const from = address();
    const input = { email: `${randomUUID()}@people.example`, password: 'x', address: from };
    for (let n = 1; n <= 5; n++) await outcomeOf(verifySignIn(input, refusingHasher()));
    await expect(verifySignIn(input, refusingHasher())).rejects.toMatchObject({ code: 'too-many', retryAfterSeconds: expect.any(Number) });
  });

  it('lets no burst of parallel guesses through', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    const passwords = refusingHasher();
    const from = address();
    await Promise.all(
      Array.from({ length: 20 }, (_, n) =>
        outcomeOf(verifySignIn({ email: person.email, password: `guess number ${n}`, address: from }, passwords)),
      ),
    );
    expect(passwords.verifications).toBe(5);
  });

  it('forgets failures after a success', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    const from = address();
    for (let round = 1; round <= 3; round++) {
      for (let n = 1; n <= 4; n++) {
        await outcomeOf(verifySignIn({ email: person.email, password: 'a slip of the finger', address: from }));
      }
      await verifySignIn({ email: person.email, password: PASSWORD, address: from });
    }
  });
});

describe('argon2Hasher', () => {
  it('makes argon2id at the stated cost, and the dummy is verified at the same cost', async () => {
    const hash = await argon2Hasher.hash(PASSWORD);
    const cost = '$argon2id$v=19$m=19456,t=2,p=1$';
    expect(hash.startsWith(cost)).toBe(true);
    expect(UNMATCHABLE_HASH.startsWith(cost)).toBe(true);
    expect(UNMATCHABLE_HASH.length).toBe(hash.length);
  });

  it('verifies what it has hashed, in either Unicode form, and nothing else', async () => {
    const hash = await argon2Hasher.hash('Weberknecht für Zöpfe');
    expect(await argon2Hasher.verify(hash, 'Weberknecht für Zöpfe'.normalize('NFD'))).toBe(true);
    expect(await argon2Hasher.verify(hash, 'Weberknecht fur Zopfe')).toBe(false);
    for (const password of ['', PASSWORD, UNMATCHABLE_HASH]) {
      expect(await argon2Hasher.verify(UNMATCHABLE_HASH, password)).toBe(false);
    }
    expect(await argon2Hasher.verify('no hash', PASSWORD)).toBe(false);
  });
});
