import type { AddressInfo } from 'node:net';
import { type ParsedMail, simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

export interface SmtpRecorder {
  readonly url: string;
  readonly mails: readonly ParsedMail[];
  /** From now on the server takes a mail in and never says that it has it, until `answer` is called. */
  holdBack(): void;
  answer(): void;
  /** From now on the server refuses every mail with these words, until `accept` is called. */
  refuse(words: string): void;
  accept(): void;
  /** Resolves when this many mails have come in, counted from the start. */
  received(count: number): Promise<void>;
  close(): Promise<void>;
}

/** A mail server that keeps what it is given and fails on demand. */
export async function startSmtpRecorder(): Promise<SmtpRecorder> {
  const mails: ParsedMail[] = [];
  const waiting: { count: number; resolve: () => void }[] = [];
  let held: (() => void)[] | null = null;
  let refusal: string | null = null;

  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    onData(stream, _session, done) {
      void simpleParser(stream).then((mail) => {
        if (refusal) return done(new Error(refusal));
        mails.push(mail);
        for (const each of waiting) if (mails.length >= each.count) each.resolve();
        if (held) held.push(() => done());
        else done();
      });
    },
  });
  // A client that is killed in the middle of a mail resets its connection.
  server.on('error', () => {});
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', () => resolve()));
  const { port } = server.server.address() as AddressInfo;

  return {
    url: `smtp://127.0.0.1:${port}`,
    mails,
    holdBack: () => {
      held ??= [];
    },
    answer: () => {
      const waitingForAnswer = held ?? [];
      held = null;
      for (const done of waitingForAnswer) done();
    },
    refuse: (words) => {
      refusal = words;
    },
    accept: () => {
      refusal = null;
    },
    received: (count) =>
      new Promise((resolve) => {
        if (mails.length >= count) resolve();
        else waiting.push({ count, resolve });
      }),
    close: () => new Promise((resolve) => server.close(() => resolve())),
  };
}
