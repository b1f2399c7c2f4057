import * as z from 'zod';

/** A plan by its ids and the booking's reference: whoever may see more opens the link and signs in. */
const planNews = z.strictObject({
  schemaVersion: z.literal(1),
  planId: z.uuid(),
  planVersion: z.int().min(1),
  reference: z.string().max(64),
});

/**
 * Every kind of mail with what its text needs. The payload is stored with its schemaVersion; no mail carries a
 * patient's size, and no payload a secret: the link is handed over when the mail is written.
 */
export const MAIL_KINDS = {
  invitation: z.strictObject({ schemaVersion: z.literal(1), expiresAt: z.iso.datetime() }),
  'password-reset': z.strictObject({ schemaVersion: z.literal(1), expiresAt: z.iso.datetime() }),
  /** To someone without an account: it says nothing of the booking. */
  'size-request': z.strictObject({ schemaVersion: z.literal(1), expiresAt: z.iso.datetime(), reminder: z.boolean() }),
  'sign-off-asked': planNews,
  'plan-for-use': planNews,
  'plan-sent-back': planNews,
  /** A booking by its id and reference; why the lead is asked stands on its page. */
  escalation: z.strictObject({ schemaVersion: z.literal(1), bookingId: z.uuid(), reference: z.string().max(64) }),
} as const;

export type MailKind = keyof typeof MAIL_KINDS;
export type MailPayload<Kind extends MailKind> = z.infer<(typeof MAIL_KINDS)[Kind]>;

export interface MailText {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

interface Draft {
  readonly subject: string;
  readonly paragraphs: readonly string[];
  readonly link: { readonly words: string; readonly url: string };
  readonly closing: string;
}

const until = (iso: string) => `${iso.slice(0, 16).replace('T', ' ')} UTC`;

type Drafts = { readonly [Kind in MailKind]: (payload: MailPayload<Kind>, siteName: string, url: string) => Draft };

const nameOf = ({ reference, planVersion }: MailPayload<'plan-for-use'>) =>
  `${reference === '' ? 'a plan without a booking' : reference}, version ${planVersion}`;
const NO_SIZES = 'Sizes and pictures stay in Selvedge: sign in to see them.';

const DRAFTS: Drafts = {
  invitation: (payload, siteName, url) => ({
    subject: `Your Selvedge account at ${siteName}`,
    paragraphs: [`An account for Selvedge, the planning aid for fold in MR pictures, was made for you at ${siteName}.`],
    link: { words: 'Choose a password', url },
    closing: `The link works once, until ${until(payload.expiresAt)}. If you did not expect this, do nothing.`,
  }),
  'password-reset': (payload, siteName, url) => ({
    subject: 'A new password for Selvedge',
    paragraphs: [`Someone asked for a new password for your Selvedge account at ${siteName}.`],
    link: { words: 'Choose a new password', url },
    closing: `The link works once, until ${until(payload.expiresAt)}. If it was not you, do nothing: your password stays.`,
  }),
  'size-request': (payload, siteName, url) => ({
    subject: `${payload.reminder ? 'A reminder: a' : 'A'} few measurements for your MR scan at ${siteName}`,
    paragraphs: [
      `${siteName} is preparing your MR scan. With a few measurements of your body we can choose the scanner and the time that suit you.`,
      'It takes about five minutes and a tape measure; another person can help. You need no account, and your name is not asked for.',
    ],
    link: { words: 'Give the measurements', url },
    closing: `The link works until ${until(payload.expiresAt)}. If you have given them already, or would rather not, do nothing: your appointment stays.`,
  }),
  'sign-off-asked': (payload, siteName, url) => ({
    subject: `Sign-off asked: ${nameOf(payload)}`,
    paragraphs: [
      `At ${siteName} a plan was put for use that a radiologist has to sign off first: ${nameOf(payload)}.`,
      'You can sign it off, or send it back with a reason.',
    ],
    link: { words: 'Open the plan', url },
    closing: NO_SIZES,
  }),
  'plan-for-use': (payload, siteName, url) => ({
    subject: `Plan for use: ${nameOf(payload)}`,
    paragraphs: [`At ${siteName} a plan can be scanned from: ${nameOf(payload)}.`],
    link: { words: 'Open the plan', url },
    closing: NO_SIZES,
  }),
  'plan-sent-back': (payload, siteName, url) => ({
    subject: `Plan sent back: ${nameOf(payload)}`,
    paragraphs: [`At ${siteName} a radiologist sent your plan back: ${nameOf(payload)}. The reason stands on its page.`],
    link: { words: 'Open the plan', url },
    closing: NO_SIZES,
  }),
  escalation: ({ reference }, siteName, url) => ({
    subject: `A lead is asked to decide: ${reference}`,
    paragraphs: [
      `At ${siteName} nobody but a lead can decide how the booking ${reference} goes on.`,
      'Why you are asked, and what was found, stands on its page.',
    ],
    link: { words: 'Open the booking', url },
    closing: NO_SIZES,
  }),
};

const ESCAPES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };
const escapeHtml = (text: string) => text.replace(/[&<>"']/g, (character) => ESCAPES[character] ?? character);

function draftOf<Kind extends MailKind>(kind: Kind, payload: unknown, siteName: string, url: string): Draft {
  return DRAFTS[kind](MAIL_KINDS[kind].parse(payload) as MailPayload<Kind>, siteName, url);
}

/** Subject, text and HTML of a stored mail. Throws when the payload is not one this program knows. */
export function writeMail(kind: string, payload: unknown, siteName: string, url: string): MailText {
  if (!(kind in MAIL_KINDS)) throw new Error(`No mail of kind "${kind}"`);
  const { subject, paragraphs, link, closing } = draftOf(kind as MailKind, payload, siteName, url);
  return {
    // A line break in a site's name would start a header of its own.
    subject: subject.replace(/\s+/g, ' '),
    text: [...paragraphs, `${link.words}:\n${link.url}`, closing].join('\n\n'),
    html: [
      ...paragraphs.map((words) => `<p>${escapeHtml(words)}</p>`),
      `<p><a href="${escapeHtml(link.url)}">${escapeHtml(link.words)}</a></p>`,
      `<p>${escapeHtml(closing)}</p>`,
    ].join('\n'),
  };
}
