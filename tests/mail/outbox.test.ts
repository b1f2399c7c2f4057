import { sql } from 'kysely';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { inTransaction } from '@/db/client';
import { MAX_ATTEMPTS, queueMail, retryDelaySeconds, smtpTransport, writeMail } from '@/lib/mail';
import { deliverMail } from '@/lib/services/mail/deliver-mail';
import { passwordLink } from '@/lib/services/session/password-link';
import { createTestSite, ownerDatabase, type TestSite } from '@/tests/support/database';
import { type SmtpRecorder, startSmtpRecorder } from '@/tests/support/smtp-recorder';

const LINK = 'http://127.0.0.1:3000/set-password#a-secret';
const EXPIRES = '2030-01-01T12:00:00.000Z';
/** Long after every row made here is due. */
const LATER = (attempt: number) => new Date(Date.UTC(2031, 0, 1 + attempt));

describe('the outbox', () => {
  let server: SmtpRecorder;
  let transport: ReturnType<typeof smtpTransport>;
  let site: TestSite;
  beforeAll(async () => {
    server = await startSmtpRecorder();
    transport = smtpTransport({ url: server.url, from: 'Selvedge <selvedge@selvedge.example>' });
    site = await createTestSite({ name: 'A & B <Imaging>' });
  });
  afterAll(async () => {
    transport.close();
    await server.close();
  });

  const invite = async (userId: string) =>
    site.withApp((trx) =>
      queueMail(trx, site.siteId, { kind: 'invitation', to: { userId }, payload: { expiresAt: EXPIRES } }),
    );
  const row = (id: string) =>
    site.withApp((trx) =>
      trx.selectFrom('mail_outbox').selectAll().where('site_id', '=', site.siteId).where('id', '=', id).executeTakeFirstOrThrow(),
    );
  const deliver = (outboxId: string, now: Date) => deliverMail({ siteId: site.siteId, outboxId }, transport, { now });

  it('sends a mail once, in text and HTML, under the Message-ID it was written with, and then empties its payload', async () => {
    const person = await site.person('lead');
    const id = await invite(person.userId);
    const { message_id } = await row(id);
    expect(await deliver(id, LATER(0))).toBe('sent');
    expect(await deliver(id, LATER(0))).toBe('nothing to do');

    const mine = server.mails.filter((mail) => mail.messageId === message_id);
    expect(mine).toHaveLength(1);
    expect(mine[0]!.subject).toBe('Your Selvedge account at A & B <Imaging>');
    expect(mine[0]!.text).toContain(passwordLink(id));
    expect(mine[0]!.html).toContain('A &amp; B &lt;Imaging&gt;');
    expect(await row(id)).toMatchObject({ status: 'sent', attempts: 1, payload: { schemaVersion: 1 } });
  });

  it('queues a job in the same transaction: neither is there when the change fails', async () => {
    const person = await site.person('lead');
    const jobs = async () => {
      const { rows } = await sql<{ data: { siteId: string } }>`
        select data from pgboss.job where name = 'deliver-mail' and data ->> 'siteId' = ${site.siteId}`.execute(ownerDatabase());
      return rows.length;
    };
    const mails = () => site.withApp((trx) => trx.selectFrom('mail_outbox').select('id').execute());
    const before = { jobs: await jobs(), mails: (await mails()).length };
    await expect(
      inTransaction(site.siteId, async (trx) => {
        await queueMail(trx, site.siteId, {
          kind: 'invitation',
          to: { userId: person.userId },
          payload: { expiresAt: EXPIRES },
        });
        throw new Error('the change failed');
      }),
    ).rejects.toThrow('the change failed');
    expect({ jobs: await jobs(), mails: (await mails()).length }).toEqual(before);
    await invite(person.userId);
    expect({ jobs: await jobs(), mails: (await mails()).length }).toEqual({ jobs: before.jobs + 1, mails: before.mails + 1 });
  });

  it('puts a refused mail back for later, keeps the server’s words, and sends it under the same Message-ID', async () => {
    const person = await site.person('lead');
    const id = await invite(person.userId);
    const { message_id } = await row(id);
    server.refuse('450 mailbox busy');
    expect(await deliver(id, LATER(0))).toBe('put back');
    server.accept();
    const waiting = await row(id);
    expect(waiting).toMatchObject({ status: 'queued', attempts: 1 });
    expect(waiting.last_error).toContain('mailbox busy');
    expect(waiting.next_attempt_at.getTime() - LATER(0).getTime()).toBe(retryDelaySeconds(1)! * 1000);
    expect(await deliver(id, LATER(0))).toBe('nothing to do');
    expect(await deliver(id, LATER(1))).toBe('sent');
    expect(server.mails.filter((mail) => mail.messageId === message_id)).toHaveLength(1);
  });

  it('gives a mail up after its last try, visibly, and keeps what is needed to send it again', async () => {
    const person = await site.person('lead');
    const id = await invite(person.userId);
    server.refuse('550 no such mailbox');
    for (let attempt = 1; attempt < MAX_ATTEMPTS; attempt++) expect(await deliver(id, LATER(attempt))).toBe('put back');
    expect(await deliver(id, LATER(MAX_ATTEMPTS))).toBe('given up');
    server.accept();
    expect(await row(id)).toMatchObject({ status: 'failed', attempts: MAX_ATTEMPTS, payload: { schemaVersion: 1, expiresAt: EXPIRES } });
    expect((await row(id)).last_error).toContain('no such mailbox');
  });

  it('sends nothing to a person who has been disabled', async () => {
    const person = await site.person('lead');
    const id = await invite(person.userId);
    const before = server.mails.length;
    await site.withApp((trx) =>
      trx.updateTable('app_user').set({ disabled_at: new Date() }).where('site_id', '=', site.siteId).where('id', '=', person.userId).execute(),
    );
    expect(await deliver(id, LATER(0))).toBe('put back');
    expect((await row(id)).last_error).toContain('disabled');
    expect(server.mails).toHaveLength(before);
  });

  it('leaves a mail alone that another worker is sending', async () => {
    const person = await site.person('lead');
    const id = await invite(person.userId);
    const before = server.mails.length;
    server.holdBack();
    const first = deliver(id, LATER(0));
    await server.received(before + 1);
    expect(await deliver(id, LATER(0))).toBe('nothing to do');
    server.answer();
    expect(await first).toBe('sent');
    expect(server.mails).toHaveLength(before + 1);
  });

  it('sends no other site’s mail', async () => {
    const other = await createTestSite();
    const person = await site.person('lead');
    const id = await invite(person.userId);
    expect(await deliverMail({ siteId: other.siteId, outboxId: id }, transport, { now: LATER(0) })).toBe('nothing to do');
  });
});

describe('retryDelaySeconds', () => {
  it('grows to four hours and ends', () => {
    const delays = Array.from({ length: MAX_ATTEMPTS }, (_, failures) => retryDelaySeconds(failures + 1));
    expect(delays.slice(0, 4)).toEqual([5, 20, 80, 320]);
    expect(Math.max(...delays.filter((delay) => delay !== null))).toBe(4 * 3600);
    expect(delays.at(-1)).toBeNull();
  });
});

describe('writeMail', () => {
  it('refuses a kind or a payload it does not know', () => {
    expect(() => writeMail('postcard', {}, 'Site', LINK)).toThrow('postcard');
    expect(() => writeMail('invitation', { schemaVersion: 2 }, 'Site', LINK)).toThrow();
  });

  it('lets no site name start a header of its own', () => {
    const mail = writeMail('invitation', { schemaVersion: 1, expiresAt: EXPIRES }, 'A\r\nBcc: all@selvedge.example', LINK);
    expect(mail.subject).not.toMatch(/[\r\n]/);
  });
});
