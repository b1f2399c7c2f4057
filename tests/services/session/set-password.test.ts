import { randomUUID } from 'node:crypto';
import { sql } from 'kysely';
import { describe, expect, it } from 'vitest';
import { askPasswordLink } from '@/lib/services/session/ask-password-link';
import { LINK_HOURS, passwordLink } from '@/lib/services/session/password-link';
import { inspectPasswordLink, setPassword } from '@/lib/services/session/set-password';
import { verifySignIn } from '@/lib/services/session/verify-sign-in';
import { createTestSite, type TestSite } from '@/tests/support/database';
import { activePerson, auditActions, changeAccount, outcomeOf, PASSWORD, readAccount } from '@/tests/support/database/accounts';

const NEW = 'warp and weft at midnight';
const fresh = () => `test ${randomUUID()}`;

async function mailsTo(site: TestSite, userId: string) {
  return site.withApp((trx) =>
    trx
      .selectFrom('mail_outbox')
      .selectAll()
      .where('site_id', '=', site.siteId)
      .where('to_user_id', '=', userId)
      .orderBy('created_at')
      .execute(),
  );
}

/** The secrets of the links in a person's mails, oldest first, as the worker would write them. */
async function linksTo(site: TestSite, userId: string): Promise<string[]> {
  return (await mailsTo(site, userId)).map((mail) => new URL(passwordLink(mail.id)).hash.slice(1));
}

async function askFor(site: TestSite, email: string, userId: string, now?: Date): Promise<string> {
  await askPasswordLink({ email, address: fresh() }, now);
  return (await linksTo(site, userId)).at(-1)!;
}

const choose = (token: string, password = NEW, now?: Date) =>
  setPassword({ token, newPassword: password, repeatPassword: password }, undefined, now);

describe('a mailed password link', () => {
  it('sets the password, ends every session and signs in', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    const token = await askFor(site, person.email, person.userId);
    expect(await inspectPasswordLink({ token })).toMatchObject({ email: person.email, first: false });
    expect(await choose(token)).toEqual({ email: person.email });
    expect((await readAccount(site, person.userId)).session_epoch).toBe(2);
    expect((await verifySignIn({ email: person.email, password: NEW, address: fresh() })).sessionEpoch).toBe(2);
    expect(await outcomeOf(verifySignIn({ email: person.email, password: PASSWORD, address: fresh() }))).toMatch(/^unauth/);
    expect(await auditActions(site, person.userId)).toEqual([
      'account.ask-password-link',
      'account.set-password',
      'account.sign-in',
    ]);
  });

  it('works once; looking does not use it', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    const token = await askFor(site, person.email, person.userId);
    for (let n = 1; n <= 3; n++) await inspectPasswordLink({ token });
    await choose(token);
    expect(await outcomeOf(choose(token, 'another password here'))).toMatch(/^gone/);
    expect(await outcomeOf(inspectPasswordLink({ token }))).toMatch(/^gone/);
    await verifySignIn({ email: person.email, password: NEW, address: fresh() });
  });

  it('lets exactly one of two simultaneous uses through', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    const token = await askFor(site, person.email, person.userId);
    const outcomes = await Promise.all([outcomeOf(choose(token, `${NEW} one`)), outcomeOf(choose(token, `${NEW} two`))]);
    expect(outcomes.filter((outcome) => outcome === 'done')).toHaveLength(1);
    expect(outcomes.filter((outcome) => outcome.startsWith('gone'))).toHaveLength(1);
  });

  it('is as good as unknown when expired, and good until then', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    const asked = new Date();
    const token = await askFor(site, person.email, person.userId, asked);
    const after = (hours: number) => new Date(asked.getTime() + hours * 3_600_000);
    expect(await outcomeOf(inspectPasswordLink({ token }, after(LINK_HOURS['password-reset'])))).toMatch(/^gone/);
    expect(await outcomeOf(choose(token, NEW, after(LINK_HOURS['password-reset'])))).toMatch(/^gone/);
    expect(await outcomeOf(choose(token, NEW, after(LINK_HOURS['password-reset'] - 0.01)))).toBe('done');
  });

  it('ends with its siblings and with the account', async () => {
    const site = await createTestSite();
    const [person, left] = [await activePerson(site, 'lead'), await activePerson(site, 'lead')];
    const first = await askFor(site, person.email, person.userId);
    const second = await askFor(site, person.email, person.userId);
    // A stranger's asking must not spoil the link the owner waits for.
    await inspectPasswordLink({ token: first });
    await choose(second);
    expect(await outcomeOf(choose(first))).toMatch(/^gone/);

    const token = await askFor(site, left.email, left.userId);
    await changeAccount(site, left.userId, { disabled_at: new Date() });
    expect(await outcomeOf(inspectPasswordLink({ token }))).toMatch(/^gone/);
    expect(await outcomeOf(choose(token))).toMatch(/^gone/);
  });

  it('says the same to every wrong link', async () => {
    const tokens = ['', 'x', '\u0000', randomUUID(), 'A'.repeat(43), 'A'.repeat(100_000), "' or true --"];
    const outcomes = new Set<string>();
    for (const token of tokens) outcomes.add(await outcomeOf(inspectPasswordLink({ token })));
    expect(outcomes.size).toBe(1);
    expect([...outcomes][0]).toMatch(/^gone/);
  });

  it('keeps its secret out of the database, the queue and the audit log', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    const token = await askFor(site, person.email, person.userId);
    expect(token).toMatch(/^[\w-]{43}$/); // 256 bits in base64url
    const dump = await site.withApp(async (trx) => {
      const texts: unknown[] = [];
      for (const table of ['mail_outbox', 'one_time_token', 'audit_event', 'app_user', 'pgboss.job']) {
        const { rows } = await sql`select to_jsonb(t)::text as row from ${sql.table(table)} t`.execute(trx);
        expect(rows.length, table).toBeGreaterThan(0);
        texts.push(...rows);
      }
      return JSON.stringify(texts);
    });
    expect(dump).not.toContain(token);
  });

  it('refuses a weak password beside its control and stays good', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    const token = await askFor(site, person.email, person.userId);
    for (const weak of ['short', 'aaaaaaaaaaaaaaaa', 'abcdefghijklmnop', 'password123456', person.email.slice(0, 36)]) {
      expect(await outcomeOf(choose(token, weak)), weak).toMatch(/^invalid \|.*newPassword/);
    }
    const differ = setPassword({ token, newPassword: NEW, repeatPassword: `${NEW}!` });
    expect(await outcomeOf(differ)).toMatch(/repeatPassword/);
    await choose(token);
  });
});

describe('askPasswordLink', () => {
  it('writes nothing for a stranger and the same nothing comes back', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    const disabled = await activePerson(site, 'lead');
    await changeAccount(site, disabled.userId, { disabled_at: new Date() });
    const answers = [];
    for (const email of [person.email, disabled.email, `${randomUUID()}@people.example`]) {
      answers.push(await askPasswordLink({ email, address: fresh() }));
    }
    expect(answers).toEqual([undefined, undefined, undefined]);
    expect(await mailsTo(site, person.userId)).toHaveLength(1);
    expect(await mailsTo(site, disabled.userId)).toHaveLength(0);
  });

  it('sends an invited person the invitation again', async () => {
    const site = await createTestSite();
    const invited = await site.person('educator');
    await askPasswordLink({ email: `${invited.userId}@people.example`, address: fresh() });
    expect((await mailsTo(site, invited.userId)).map((mail) => mail.kind)).toEqual(['invitation']);
  });

  it('stops mailing after five asks in a row from one address', async () => {
    const site = await createTestSite();
    const person = await activePerson(site, 'lead');
    const from = fresh();
    for (let n = 1; n <= 9; n++) await askPasswordLink({ email: person.email, address: from });
    expect(await mailsTo(site, person.userId)).toHaveLength(5);
    // Asking does not lock the owner out of signing in.
    await verifySignIn({ email: person.email, password: PASSWORD, address: from });
  });
});
