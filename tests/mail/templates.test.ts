import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { MAIL_KINDS, type MailKind, writeMail } from '@/lib/mail';
import { QUANTITY_FACTS } from '@/lib/domain/size-reading/quantities';

const PLAN = { planId: randomUUID(), planVersion: 3, reference: 'AB-1234' };
const PAYLOADS: Readonly<Record<MailKind, Record<string, unknown>>> = {
  invitation: { expiresAt: '2030-01-01T12:00:00.000Z' },
  'password-reset': { expiresAt: '2030-01-01T12:00:00.000Z' },
  'size-request': { expiresAt: '2030-01-01T12:00:00.000Z', reminder: true },
  'sign-off-asked': PLAN,
  'plan-for-use': PLAN,
  'plan-sent-back': PLAN,
  escalation: { bookingId: randomUUID(), reference: 'AB-1234' },
};
const LINK = 'http://127.0.0.1:3000/somewhere#a-secret';
const KINDS = Object.keys(MAIL_KINDS) as MailKind[];
const write = (kind: MailKind) => writeMail(kind, { schemaVersion: 1, ...PAYLOADS[kind] }, 'Harbour MRI', LINK);

describe.each(KINDS)('a mail of kind %s', (kind) => {
  it('says the same in text and in HTML, with one link', () => {
    const { subject, text, html } = write(kind);
    expect(subject.length).toBeGreaterThan(5);
    expect(text.match(/https?:\/\/\S+/g)).toEqual([LINK]);
    expect(html.match(/href="[^"]+"/g)).toEqual([`href="${LINK}"`]);
    const words = (from: string) => from.replace(/<[^>]+>/g, ' ').replaceAll(LINK, ' ').replaceAll(/&#39;|&quot;/g, '’').replace(/[’'":\s]+/g, ' ').trim();
    expect(words(html)).toBe(words(text));
  });

  it('has no figure with a unit of size in it, and nowhere to put one', () => {
    const { subject, text, html } = write(kind);
    const units = [...new Set(Object.values(QUANTITY_FACTS).map(({ unit }) => unit)), 'lb', 'in', 'inches'].filter((unit) => /^[a-z]+$/.test(unit));
    expect(units).toEqual(expect.arrayContaining(['mm', 'cm', 'kg', 's']));
    expect(`${subject}\n${text}\n${html}`).not.toMatch(new RegExp(`\\d\\s?(${units.join('|')})\\b`));
    for (const quantity of [...Object.keys(QUANTITY_FACTS), 'sizes', 'patient', 'note', 'reason']) {
      expect(MAIL_KINDS[kind].safeParse({ schemaVersion: 1, ...PAYLOADS[kind], [quantity]: 481 }).success, quantity).toBe(false);
    }
    expect(MAIL_KINDS[kind].safeParse({ schemaVersion: 1, ...PAYLOADS[kind] }).success).toBe(true);
  });
});
