import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { MAX_ATTEMPTS, queueMail, smtpTransport } from '@/lib/mail';
import { escalateBooking } from '@/lib/services/booking-entry/write-entry';
import { deliverMail } from '@/lib/services/mail/deliver-mail';
import { countUndelivered, listMail } from '@/lib/services/mail/list-mail';
import { retryMail } from '@/lib/services/mail/retry-mail';
import { askSize } from '@/lib/services/size-request/ask-size';
import { cancelSizeRequest } from '@/lib/services/size-request/end-size-request';
import { as, equipSite, type EquippedSite, NOW } from '@/tests/support/equipped-site';
import { type SmtpRecorder, startSmtpRecorder } from '@/tests/support/smtp-recorder';

const ADDRESS = 'someone.private@mail.example';
const later = (minutes: number) => new Date(Date.now() + minutes * 60_000);

describe('mail that could not be delivered', () => {
  let here: EquippedSite;
  let server: SmtpRecorder;
  let transport: ReturnType<typeof smtpTransport>;
  beforeAll(async () => {
    here = await equipSite();
    server = await startSmtpRecorder();
    transport = smtpTransport({ url: server.url, from: 'Selvedge <selvedge@selvedge.example>' });
  });
  afterAll(async () => {
    transport.close();
    await server.close();
  });

  const messageIds = async () => (await here.site.withApp((trx) => trx.selectFrom('mail_outbox').select(['id', 'message_id']).execute()));
  const newest = async () => (await listMail(as(here.lead))).queued[0]!.id;
  const deliver = (outboxId: string, now: Date) => deliverMail({ siteId: here.site.siteId, outboxId }, transport, { now });
  async function giveUp(id: string): Promise<void> {
    server.refuse('550 no such mailbox');
    for (let attempt = 1; attempt <= MAX_ATTEMPTS; attempt += 1) await deliver(id, later(attempt * 60 * 24));
    server.accept();
  }

  it('is listed with its tries and the server’s words, and goes out again as the same message', async () => {
    await escalateBooking(as(here.coordinator), { bookingId: here.booking.id, note: 'Girth 1480 mm, what now?' });
    // Nobody has set a password yet, so nobody is told; the lead is, once they have.
    expect((await listMail(as(here.lead))).queued).toEqual([]);
    const id = await here.site.withApp((trx) =>
      queueMail(trx, here.site.siteId, { kind: 'escalation', to: { userId: here.lead.userId }, payload: { bookingId: here.booking.id, reference: 'AB-1234' } }));
    const before = await messageIds();
    await giveUp(id);
    const { failed } = await listMail(as(here.coordinator));
    expect(failed).toMatchObject([{ id, kind: 'escalation', status: 'failed', attempts: MAX_ATTEMPTS, to: here.lead.displayName, maySendAgain: true }]);
    expect(failed[0]!.problem).toContain('no such mailbox');
    expect(await countUndelivered(as(here.lead))).toBe(1);
    expect(await countUndelivered(as(here.radiographer))).toBe(0);

    await retryMail({ actor: here.coordinator }, { id });
    expect(await deliver(id, later(1))).toBe('sent');
    expect(await messageIds()).toEqual(before);
    expect(server.mails.map(({ messageId }) => messageId)).toEqual([before.find((one) => one.id === id)!.message_id]);
    expect(server.mails[0]!.text).toContain(`/bookings/${here.booking.id}`);
    expect(`${server.mails[0]!.subject}${server.mails[0]!.text}`).not.toContain('1480');
    await expect(retryMail(as(here.lead), { id })).rejects.toMatchObject({ code: 'conflict' });
    const audited = await here.site.withApp((trx) => trx.selectFrom('audit_event').select(['action', 'subject_id']).where('action', '=', 'mail.retry').execute());
    expect(audited).toEqual([{ action: 'mail.retry', subject_id: id }]);
  });

  it('for a patient shows a masked address only, and goes out again only while it is asked for', async () => {
    const { id: requestId } = await askSize({ actor: here.coordinator }, { bookingId: here.booking.id, address: ADDRESS });
    const id = await newest();
    server.refuse(`550 <${ADDRESS}> unknown`);
    expect(await deliver(id, later(1))).toBe('put back');
    server.accept();
    const list = await listMail({ actor: here.lead });
    expect(list.queued).toMatchObject([{ id, kind: 'size-request', attempts: 1, maySendAgain: true, booking: { id: here.booking.id, accession: 'AB-1234' } }]);
    expect(list.queued[0]!.nextAttemptAt).toBeDefined();
    expect(JSON.stringify(list)).not.toContain(ADDRESS);
    await cancelSizeRequest({ actor: here.coordinator }, { id: requestId });
    const [ended] = (await listMail({ actor: here.lead })).queued;
    expect(ended).toMatchObject({ id, maySendAgain: false, to: 'address erased' });
    await expect(retryMail({ actor: here.lead }, { id })).rejects.toMatchObject({ code: 'conflict' });
  });

  it('is neither seen nor sent by others', async () => {
    await expect(listMail(as(here.radiographer))).rejects.toMatchObject({ code: 'not-found' });
    const [one] = await messageIds();
    await expect(retryMail(as(here.radiographer), { id: one!.id })).rejects.toMatchObject({ code: 'not-found' });
    const other = await equipSite();
    expect((await listMail(as(other.lead))).failed).toEqual([]);
    await expect(retryMail(as(other.lead), { id: one!.id })).rejects.toMatchObject({ code: 'not-found' });
  });

  it('of a link that has run out is not sent again', async () => {
    const id = await here.site.withApp((trx) => queueMail(trx, here.site.siteId, { kind: 'invitation', to: { userId: here.radiologist.userId }, payload: { expiresAt: NOW.toISOString() } }));
    await giveUp(id);
    expect((await listMail(as(here.lead))).failed.find((mail) => mail.id === id)).toMatchObject({ maySendAgain: false });
    await expect(retryMail(as(here.lead), { id })).rejects.toMatchObject({ code: 'conflict' });
  });

  it('an escalation is mailed to every lead who works here, and to nobody else', async () => {
    const fresh = await equipSite();
    await fresh.site.withApp((trx) => trx.updateTable('app_user').set({ password_hash: 'set' }).where('site_id', '=', fresh.site.siteId).execute());
    await escalateBooking(as(fresh.coordinator), { bookingId: fresh.booking.id, note: 'What now?' });
    const mails = await fresh.site.withApp((trx) => trx.selectFrom('mail_outbox').select(['kind', 'to_user_id', 'payload']).execute());
    expect(mails).toEqual([{ kind: 'escalation', to_user_id: fresh.lead.userId, payload: { schemaVersion: 1, bookingId: fresh.booking.id, reference: 'AB-1234' } }]);
  });
});
