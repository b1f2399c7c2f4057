import { type ChildProcess, spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { queueMail } from '@/lib/mail';
import { createTestSite, type TestSite, useOwnDatabase } from '@/tests/support/database';
import { type SmtpRecorder, startSmtpRecorder } from '@/tests/support/smtp-recorder';
import { countOf, tally } from '@/tests/support/tally';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const KILLS = countOf('SELVEDGE_KILLS', 3);

/** The worker as "npm start" begins it, looking for due mail every 100 ms instead of every 5 s. */
function startWorker(smtpUrl: string): ChildProcess {
  return spawn(process.execPath, ['--import', 'tsx', 'lib/ops/worker.ts'], {
    cwd: ROOT,
    env: { ...process.env, SMTP_URL: smtpUrl, SELVEDGE_SWEEP_SECONDS: '0.1' },
    stdio: 'ignore',
  });
}

const gone = (child: ChildProcess) => new Promise<void>((resolve) => child.once('exit', () => resolve()));

describe('a worker that is killed outright', () => {
  let server: SmtpRecorder;
  let site: TestSite;
  let worker: ChildProcess | undefined;

  beforeAll(async () => {
    await useOwnDatabase();
    server = await startSmtpRecorder();
    site = await createTestSite();
  });
  afterEach(async () => {
    if (worker && worker.exitCode === null && worker.signalCode === null) {
      const ended = gone(worker);
      worker.kill('SIGKILL');
      await ended;
    }
  });
  afterAll(() => server.close());

  const statusOf = async (id: string) => {
    const row = await site.withApp((trx) =>
      trx.selectFrom('mail_outbox').select(['status', 'message_id']).where('site_id', '=', site.siteId).where('id', '=', id).executeTakeFirstOrThrow(),
    );
    return row;
  };

  it(`in the middle of a mail loses nothing and keeps one Message-ID for one event (${KILLS} kills)`, async () => {
    const person = await site.person('lead');
    for (let kill = 1; kill <= KILLS; kill++) {
      const before = server.mails.length;
      server.holdBack();
      worker = startWorker(server.url);
      const id = await site.withApp((trx) =>
        queueMail(trx, site.siteId, {
          kind: 'invitation',
          to: { userId: person.userId },
          payload: { expiresAt: '2030-01-01T00:00:00.000Z' },
        }),
      );
      // The server has the mail; the worker waits to hear so and has not noted it down.
      await server.received(before + 1);
      const ended = gone(worker);
      worker.kill('SIGKILL');
      await ended;
      server.answer();
      const { status, message_id } = await statusOf(id);
      expect(status, `after kill ${kill}`).toBe('queued');

      worker = startWorker(server.url);
      await server.received(before + 2);
      // Asked to stop, it first notes down what it has in hand.
      const stopped = gone(worker);
      worker.kill('SIGTERM');
      await stopped;
      expect((await statusOf(id)).status).toBe('sent');
      const sent = server.mails.slice(before).map((mail) => mail.messageId);
      expect(sent.length, 'at least once').toBeGreaterThanOrEqual(2);
      expect([...new Set(sent)]).toEqual([message_id]);
    }
    tally('worker killed in the middle of a mail', KILLS, 'one Message-ID each');
  }, 60_000 + KILLS * 20_000);
});
