import * as z from 'zod';

/**
 * Every kind of mail with what its text needs. The payload is stored with its schemaVersion; no mail carries a
 * patient's size, and no payload a secret: the link is handed over when the mail is written.
 */
export const MAIL_KINDS = {
  invitation: z.strictObject({ schemaVersion: z.literal(1), expiresAt: z.iso.datetime() }),
  'password-reset': z.strictObject({ schemaVersion: z.literal(1), expiresAt: z.iso.datetime() }),
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

function draft(kind: MailKind, payload: MailPayload<MailKind>, siteName: string, url: string): Draft {
  switch (kind) {
    case 'invitation':
      return {
        subject: `Your Selvedge account at ${siteName}`,
        paragraphs: [`An account for Selvedge, the planning aid for fold in MR pictures, was made for you at ${siteName}.`],
        link: { words: 'Choose a password', url },
        closing: `The link works once, until ${until(payload.expiresAt)}. If you did not expect this, do nothing.`,
      };
    case 'password-reset':
      return {
        subject: 'A new password for Selvedge',
        paragraphs: [`Someone asked for a new password for your Selvedge account at ${siteName}.`],
        link: { words: 'Choose a new password', url },
        closing: `The link works once, until ${until(payload.expiresAt)}. If it was not you, do nothing: your password stays.`,
      };
  }
}

const ESCAPES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };
const escapeHtml = (text: string) => text.replace(/[&<>"']/g, (character) => ESCAPES[character] ?? character);

/** Subject, text and HTML of a stored mail. Throws when the payload is not one this program knows. */
export function writeMail(kind: string, payload: unknown, siteName: string, url: string): MailText {
  if (!(kind in MAIL_KINDS)) throw new Error(`No mail of kind "${kind}"`);
  const known = kind as MailKind;
  const { subject, paragraphs, link, closing } = draft(known, MAIL_KINDS[known].parse(payload), siteName, url);
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
