import { beforeAll, describe, expect, it } from 'vitest';
import { dueWork } from '@/db/client';
import { getBooking } from '@/lib/services/booking/get-booking';
import { deliverMail } from '@/lib/services/mail/deliver-mail';
import { answerSizeRequest, openSizeRequest, reopenSizeRequest } from '@/lib/services/size-request/answer-size-request';
import { askSize, sendSizeRequest } from '@/lib/services/size-request/ask-size';
import { cancelSizeRequest, expireSizeRequest } from '@/lib/services/size-request/end-size-request';
import { listSizeRequests } from '@/lib/services/size-request/list-size-requests';
import { getSizeRecord } from '@/lib/services/size-reading/get-size-record';
import type { MailTransport } from '@/lib/mail';
import { as, equipSite, type EquippedSite } from '@/tests/support/equipped-site';

const ADDRESS = 'grethe.quarrington@mail.example';
const ANSWER = { units: 'metric', weight: 140, height: 172, girth: 132, depth: 34, sex: 'female', arms: 'up', confirmed: false };
// The gate compares with the database's own clock, so these requests are made now and not at the tests' fixed moment.
const now = () => new Date();
const today = (actor: Parameters<typeof as>[0]) => ({ actor, now: now() });
const tokenOf = (link: string) => link.split('#')[1]!;

let here: EquippedSite;
beforeAll(async () => {
  here = await equipSite();
});
const fresh = async () => {
  const mine = await equipSite();
  return { mine, ask: (address?: string) => askSize(today(mine.coordinator), { bookingId: mine.booking.id, ...(address ? { address } : {}) }) };
};
const everything = (site: EquippedSite) =>
  site.site.withApp(async (trx) => {
    const all: unknown[] = [];
    for (const table of ['size_request', 'mail_outbox', 'audit_event'] as const) {
      all.push(await trx.selectFrom(table).selectAll().where('site_id', '=', site.site.siteId).execute());
    }
    return JSON.stringify(all);
  });
const collect = () => {
  const sent: { to: string; messageId: string; text: string; html: string }[] = [];
  const transport: MailTransport = { send: async (mail) => void sent.push(mail), close: () => {} };
  return { sent, transport };
};
const outbox = async (site: EquippedSite) =>
  site.site.withApp((trx) => trx.selectFrom('mail_outbox').select(['id', 'status', 'last_error', 'message_id']).where('site_id', '=', site.site.siteId).orderBy('created_at').execute());

describe('a size request', () => {
  it('is opened as often as one likes, answered once, and flips the booking with reported sizes', async () => {
    const { mine, ask } = await fresh();
    const { id, link } = await ask();
    for (let time = 0; time < 3; time += 1) await openSizeRequest({ token: tokenOf(link) });
    const { view, claim } = await openSizeRequest({ token: tokenOf(link) });
    expect(Object.keys(view).sort()).toEqual(['expiresAt', 'siteName']);
    expect(await reopenSizeRequest(claim)).toEqual(view);
    await expect(answerSizeRequest(claim, { ...ANSWER, girth: 1320 })).rejects.toMatchObject({ fields: { girth: expect.stringContaining('millimetres') } });
    await expect(answerSizeRequest(claim, { ...ANSWER, weight: 35 })).rejects.toMatchObject({ details: { mayConfirm: true } });
    expect(await getBooking(as(mine.lead), { id: mine.booking.id })).not.toHaveProperty('verdict');

    const answers = await Promise.allSettled([1, 2, 3].map(() => answerSizeRequest(claim, ANSWER)));
    expect(answers.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
    const { readings } = await getSizeRecord(as(mine.lead), { bookingId: mine.booking.id });
    expect(readings).toHaveLength(6);
    expect(readings.every(({ source }) => source === 'reported')).toBe(true);
    expect(await getBooking(as(mine.lead), { id: mine.booking.id })).toHaveProperty('verdict');
    await expect(openSizeRequest({ token: tokenOf(link) })).rejects.toMatchObject({ code: 'gone' });
    expect(await listSizeRequests(as(mine.coordinator), { bookingId: mine.booking.id })).toMatchObject([{ id, status: 'answered' }]);
  });

  it('is mailed with text and HTML, without sizes, reference or address anywhere in clear', async () => {
    const { mine, ask } = await fresh();
    const { link } = await ask(ADDRESS);
    expect(await everything(mine)).not.toMatch(/grethe|quarrington/i);
    expect(await everything(mine)).not.toContain(tokenOf(link));
    expect(await listSizeRequests(as(mine.coordinator), { bookingId: mine.booking.id })).toMatchObject([{ addressMasked: 'g…@m….example', sentCount: 1 }]);
    const { sent, transport } = collect();
    const [mail] = await outbox(mine);
    expect(await deliverMail({ siteId: mine.site.siteId, outboxId: mail!.id }, transport)).toBe('sent');
    expect(sent).toMatchObject([{ to: ADDRESS, messageId: mail!.message_id }]);
    for (const body of [sent[0]!.text, sent[0]!.html]) {
      expect(body).toContain(link);
      expect(body).not.toContain(mine.booking.accession);
    }
  });

  it('is sent again under the same link, to another address if need be, and keeps one Message-ID for each event', async () => {
    const { mine, ask } = await fresh();
    const { id, link } = await ask(ADDRESS);
    await sendSizeRequest(today(mine.coordinator), { id });
    expect((await sendSizeRequest(today(mine.coordinator), { id, address: 'other@mail.example' })).link).toBe(link);
    const { sent, transport } = collect();
    const mails = await outbox(mine);
    for (const mail of mails) await deliverMail({ siteId: mine.site.siteId, outboxId: mail.id }, transport);
    // All go where the newest address says: the wrong one gets nothing more.
    expect(sent.map(({ to }) => to)).toEqual(Array(3).fill('other@mail.example'));
    expect(new Set(sent.map(({ messageId }) => messageId)).size).toBe(3);
  });

  it.each(['cancelled', 'expired', 'answered'] as const)('that is %s loses its address, and a mail that waits is given up', async (how) => {
    const { mine, ask } = await fresh();
    const { id, link } = await ask(ADDRESS);
    if (how === 'cancelled') await cancelSizeRequest(today(mine.coordinator), { id });
    if (how === 'answered') await answerSizeRequest((await openSizeRequest({ token: tokenOf(link) })).claim, ANSWER);
    if (how === 'expired') {
      expect(await expireSizeRequest({ siteId: mine.site.siteId, id })).toBe(false);
      expect(await expireSizeRequest({ siteId: mine.site.siteId, id }, new Date(Date.now() + 15 * 86_400_000))).toBe(true);
    }
    const [row] = await mine.site.withApp((trx) => trx.selectFrom('size_request').select(['status', 'address_sealed', 'address_masked']).where('id', '=', id).execute());
    expect(row).toEqual({ status: how, address_sealed: '', address_masked: '' });
    const { sent, transport } = collect();
    const [mail] = await outbox(mine);
    expect(await deliverMail({ siteId: mine.site.siteId, outboxId: mail!.id }, transport)).toBe('given up');
    expect(sent).toEqual([]);
    await expect(openSizeRequest({ token: tokenOf(link) })).rejects.toMatchObject({ code: 'gone' });
  });

  it('shows what a mail server refused, without the address it repeats', async () => {
    const { mine, ask } = await fresh();
    await ask(ADDRESS);
    const [mail] = await outbox(mine);
    const transport: MailTransport = { send: async () => Promise.reject(new Error(`550 <${ADDRESS}> no such user, ask postmaster@mail.example`)), close: () => {} };
    expect(await deliverMail({ siteId: mine.site.siteId, outboxId: mail!.id }, transport)).toBe('put back');
    const [request] = await listSizeRequests(as(mine.lead), { bookingId: mine.booking.id });
    expect(request!.mail).toEqual({ status: 'queued', problem: '550 <(the address)> no such user, ask (an address)' });
  });

  it('is due to end only when its time is over', async () => {
    const { mine, ask } = await fresh();
    const { id } = await ask(ADDRESS);
    const due = async () => (await dueWork('size-request-expiry', 1000)).some((work) => work.id === id);
    expect(await due()).toBe(false);
    await mine.site.withApp((trx) => trx.updateTable('size_request').set({ expires_at: new Date('2020-01-01T00:00:00Z') }).where('site_id', '=', mine.site.siteId).execute());
    expect(await due()).toBe(true);
  });

  it('is asked by the pathway only, once at a time, with an address that is one', async () => {
    const { mine, ask } = await fresh();
    await expect(askSize(today(mine.radiologist), { bookingId: mine.booking.id })).rejects.toMatchObject({ code: 'not-found' });
    await expect(askSize(today(here.coordinator), { bookingId: mine.booking.id })).rejects.toMatchObject({ code: 'not-found' });
    const refused = await askSize(today(mine.coordinator), { bookingId: mine.booking.id, address: 'grethe at mail' }).catch((error: unknown) => error);
    expect(JSON.stringify(refused)).not.toContain('grethe');
    expect(refused).toMatchObject({ fields: { address: expect.stringContaining('name@example.org') } });
    const both = await Promise.allSettled([ask(), ask()]);
    expect(both.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
  });

  it('opens for no made-up token and no tampered claim', async () => {
    await expect(openSizeRequest({ token: 'x'.repeat(43) })).rejects.toMatchObject({ code: 'gone' });
    const { mine, ask } = await fresh();
    const { claim } = await openSizeRequest({ token: tokenOf((await ask()).link) });
    const other = claim.replace(mine.site.siteId, here.site.siteId);
    for (const wrong of [other, undefined, '', claim.slice(0, -1), claim.replace(/\.\d{13}\./, '.9999999999999.')]) {
      await expect(answerSizeRequest(wrong, ANSWER)).rejects.toMatchObject({ code: 'gone' });
    }
    await expect(answerSizeRequest(claim, ANSWER, new Date(Date.now() + 61 * 60_000))).rejects.toMatchObject({ code: 'gone' });
  });
});
