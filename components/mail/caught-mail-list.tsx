import { formatMoment } from '@/lib/presentation/moment';

export interface CaughtMailItem {
  readonly messageId: string;
  readonly receivedAt: Date;
  readonly to: string;
  readonly subject: string;
  readonly text: string;
}

const LINK = /(https?:\/\/\S+)/;

/** The text of a mail with its links to follow, as a mail program shows it. */
function MailText({ text }: { text: string }) {
  return (
    <p className="mt-2 break-words whitespace-pre-wrap">
      {text.split(LINK).map((part, at) =>
        LINK.test(part) ? (
          <a key={at} href={part} className="break-all text-link">
            {part}
          </a>
        ) : (
          part
        ),
      )}
    </p>
  );
}

/** What the local mail catcher took in, newest first. */
export function CaughtMailList({ mails }: { mails: readonly CaughtMailItem[] }) {
  return (
    <ul className="divide-y divide-line">
      {mails.map((mail) => (
        <li key={mail.messageId} className="py-4">
          <h2 className="font-semibold">{mail.subject}</h2>
          <p className="text-sm text-ink-soft">
            To {mail.to}, <time dateTime={mail.receivedAt.toISOString()}>{formatMoment(mail.receivedAt)}</time>
          </p>
          <MailText text={mail.text} />
        </li>
      ))}
    </ul>
  );
}
