import { type ChildProcess, spawn } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { fileURLToPath } from 'node:url';
import { sql } from 'kysely';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { database } from '@/db/client';
import type { ImportRow } from '@/lib/domain/import';
import { queueMail } from '@/lib/mail';
import { commitImport } from '@/lib/services/import/commit-import';
import { stageRows } from '@/lib/services/import/stage-rows';
import { startImport } from '@/lib/services/import/start-import';
import { createScanner } from '@/lib/services/scanner/create-scanner';
import { editPolicy } from '@/lib/services/site-policy/edit-policy';
import { type KillableCluster, useKillableCluster } from '@/tests/support/database/killable-cluster';
import { as, equipSite, type EquippedSite, policyForm, scannerForm, sizeBooking } from '@/tests/support/equipped-site';
import { type SmtpRecorder, startSmtpRecorder } from '@/tests/support/smtp-recorder';
import { countOf, tally } from '@/tests/support/tally';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const KILLS = countOf('SELVEDGE_KILLS', 3);
const waitFor = (holds: () => Promise<boolean>) => vi.waitUntil(holds, { timeout: 60_000, interval: 50 });

/**
 * One kill of the server cuts off four things at once, each in the middle of its transaction with rows already
 * written: a piece being staged and an import being committed, by the services as the web server runs them, and a
 * check and a mail in a worker of its own process. They are held there by rows and a mail server that do not answer.
 */
describe('a database server that is killed outright', () => {
  let cluster: KillableCluster;
  let here: EquippedSite;
  let mailServer: SmtpRecorder;
  let worker: ChildProcess;
  let otherScanner: string;

  beforeAll(async () => {
    cluster = await useKillableCluster();
    mailServer = await startSmtpRecorder();
    here = await equipSite();
    otherScanner = (await createScanner(as(here.lead), scannerForm({ name: 'Second scanner' }))).id;
    await sizeBooking(here);
    worker = spawn(process.execPath, ['--import', 'tsx', 'lib/ops/worker.ts'], {
      cwd: ROOT, env: { ...process.env, SMTP_URL: mailServer.url, SELVEDGE_SWEEP_SECONDS: '0.1' }, stdio: 'ignore',
    });
  }, 120_000);
  afterAll(async () => {
    worker.kill('SIGKILL');
    await mailServer.close();
    await cluster.stop();
  }, 60_000);

  const stale = () => here.site.withApp(async (trx) => (await trx.selectFrom('booking_state').select('booking_id').where('stale', '=', 1).execute()).length);
  const blocked = async () => {
    const { rows } = await sql<{ waiting: number }>`
      select count(*)::integer as waiting from pg_stat_activity where datname = current_database() and wait_event_type = 'Lock'`.execute(database());
    return rows[0]!.waiting;
  };
  const stored = () => here.site.withApp(async (trx) => {
    const { rows } = await sql<Record<string, unknown>>`
      select (select json_agg(json_build_array(accession, slot_minutes, version) order by accession) from booking) as bookings,
        (select count(*)::integer from size_reading) as readings, (select count(*)::integer from import_row) as staged,
        (select count(*)::integer from check_result) as checks, (select count(*)::integer from audit_event) as audited,
        (select json_agg(json_build_array(message_id, status) order by message_id) from mail_outbox) as mails`.execute(trx);
    return rows[0]!;
  });
  const row = (number: number, accession: string, change: Partial<ImportRow> = {}): ImportRow => ({
    number, accession, slotMinutes: 40, scheduledAt: '2026-06-01T08:00:00.000Z', scannerId: here.scanner.id, protocolId: here.protocol.id,
    readings: [{ quantity: 'weight-kg', value: 140, source: 'reported', takenOn: '2026-05-01' }], ...change,
  });
  /** Takes what a commit, a check and a piece will come to need, on a connection that the kill ends. */
  async function holdRows(known: string): Promise<void> {
    const holder = new pg.Client({ connectionString: process.env.DATABASE_URL });
    holder.on('error', () => {});
    await holder.connect();
    await holder.query(`begin; set local app.site_id = '${here.site.siteId}'`);
    await holder.query('select id from booking where accession = $1 or id = $2 for update', [known, here.booking.id]);
    await holder.query('select id from scanner where id = $1 for update', [otherScanner]);
  }
  async function staged(rows: readonly ImportRow[]): Promise<string> {
    const { id } = await startImport(as(here.coordinator), { id: randomUUID(), format: 'csv' });
    if (rows.length > 0) await stageRows(as(here.coordinator), { importId: id, rows });
    return id;
  }

  it(`in mid-stage, mid-commit, mid-check and mid-mail loses nothing and doubles nothing (${KILLS} kills)`, async () => {
    const actor = as(here.coordinator);
    for (let kill = 1; kill <= KILLS; kill += 1) {
      const known = `KA-${1000 + kill}`;
      await commitImport(actor, { importId: await staged([row(1, known)]), expectedRows: 1 });
      const toCommit = await staged([row(1, `KB-${1000 + kill}`), row(2, known, { slotMinutes: 55 })]);
      const toStage = await staged([]);
      const piece = [row(1, `KC-${1000 + kill}`, { scannerId: otherScanner }), row(2, `KD-${1000 + kill}`, { scannerId: otherScanner })];
      await waitFor(async () => (await stale()) === 0);

      mailServer.holdBack();
      const sentBefore = mailServer.mails.length;
      const mailId = await here.site.withApp((trx) =>
        queueMail(trx, here.site.siteId, { kind: 'invitation', to: { userId: here.lead.userId }, payload: { expiresAt: '2030-01-01T00:00:00.000Z' } }));
      await mailServer.received(sentBefore + 1);
      await holdRows(known);
      // A question that was not asked before: the worker works it out and writes it.
      await editPolicy(as(here.lead), { expectedVersion: kill - 1, form: { ...policyForm(), setUpMinutes: 10 + kill } });
      const cut = Promise.allSettled([
        stageRows(actor, { importId: toStage, rows: piece }), commitImport(actor, { importId: toCommit, expectedRows: 2 }),
      ]);
      await waitFor(async () => (await blocked()) === 3);
      const before = await stored();

      await cluster.kill();
      expect((await cut).map(({ status }) => status)).toEqual(['rejected', 'rejected']);
      await cluster.start();
      mailServer.answer();
      const { mails, checks, ...rest } = before as { mails: [string, string][]; checks: number };
      expect(await stored(), `after kill ${kill}`).toMatchObject(rest);

      await stageRows(actor, { importId: toStage, rows: piece });
      expect(await commitImport(actor, { importId: toStage, expectedRows: 2 })).toMatchObject({ created: 2, changed: 0, same: 0 });
      expect(await commitImport(actor, { importId: toCommit, expectedRows: 2 })).toMatchObject({ created: 1, changed: 1, same: 0 });
      await waitFor(async () => (await stale()) === 0 && (await stored()).mails!.toString().includes('queued') === false);

      const { message_id } = await here.site.withApp((trx) => trx.selectFrom('mail_outbox').select('message_id').where('id', '=', mailId).executeTakeFirstOrThrow());
      expect(mails.map(([id]) => id)).toContain(message_id);
      const sent = mailServer.mails.slice(sentBefore).map(({ messageId }) => messageId);
      expect(sent.length, 'at least once').toBeGreaterThanOrEqual(2);
      expect([...new Set(sent)]).toEqual([message_id]);
      const results = await here.site.withApp((trx) => trx.selectFrom('check_result').select(['booking_id', 'number', 'input_hash']).execute());
      expect(results.length).toBeGreaterThan(checks);
      expect(new Set(results.map((one) => `${one.booking_id} ${one.input_hash}`)).size, 'one result for one question').toBe(results.length);
      expect(results.filter((one) => one.booking_id === here.booking.id)).toHaveLength(kill + 1);
      const bookings = ((await stored()).bookings as [string, number][]).map(([accession, minutes]) => `${accession} ${minutes}`);
      expect(bookings).toEqual(['AB-1234 40', ...Array.from({ length: kill }, (_, index) => `KA-${1001 + index} 55`),
        ...['KB', 'KC', 'KD'].flatMap((name) => Array.from({ length: kill }, (_, index) => `${name}-${1001 + index} 40`))]);
    }
    tally('database killed in mid-stage, -commit, -check and -mail at once', KILLS, 'nothing half done, one Message-ID each');
  }, 60_000 + KILLS * 60_000);
});
