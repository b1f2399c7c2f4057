import { createTransport } from 'nodemailer';
import { environment } from '@/lib/env';

export interface OutgoingMail {
  readonly to: string;
  readonly messageId: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

export interface MailTransport {
  /** Resolves once the server has taken the mail; rejects with the server's words otherwise. */
  send(mail: OutgoingMail): Promise<void>;
  close(): void;
}

export function smtpTransport(options: { readonly url: string; readonly from: string } = fromEnvironment()): MailTransport {
  const transporter = createTransport({
    url: options.url,
    // The outbox retries; a server that hangs must not hold a row for long.
    connectionTimeout: 10_000,
    greetingTimeout: 10_000,
    socketTimeout: 20_000,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return {
    send: async (mail) => void (await transporter.sendMail({ from: options.from, ...mail })),
    close: () => transporter.close(),
  };
}

function fromEnvironment(): { url: string; from: string } {
  const { smtpUrl, mailFrom } = environment();
  return { url: smtpUrl, from: mailFrom };
}
