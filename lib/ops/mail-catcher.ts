import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import { keepCaughtMail } from '@/lib/mail';

/** Takes every mail on 127.0.0.1 and keeps it in a folder: the local stand-in for a mail server. */
export function startMailCatcher(options: { readonly port: number; readonly folder: string }): Promise<() => Promise<void>> {
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    size: 10 * 1024 * 1024,
    onData(stream, session, done) {
      simpleParser(stream)
        .then((mail) =>
          keepCaughtMail(options.folder, {
            messageId: mail.messageId ?? `<none-${session.id}>`,
            receivedAt: new Date().toISOString(),
            to: session.envelope.rcptTo.map((recipient) => recipient.address).join(', '),
            subject: mail.subject ?? '',
            text: mail.text ?? '',
            html: mail.html || '',
          }),
        )
        .then(() => done(), (error: Error) => done(error));
    },
  });
  server.on('error', (error) => console.error(error.message));
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(options.port, '127.0.0.1', () => resolve(() => new Promise((closed) => server.close(closed))));
  });
}
