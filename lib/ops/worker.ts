import PgBoss from 'pg-boss';
import { paintHandOut } from '@/components/demonstration/pdf/paint-hand-out';
import { paintSheet } from '@/components/plan/pdf/paint-sheet';
import { closeDatabase, dueWork, requireSchema } from '@/db/client';
import { environment } from '@/lib/env';
import { type JobPayload, QUEUES } from '@/lib/jobs';
import { smtpTransport } from '@/lib/mail';
import { refreshBookings } from '@/lib/services/booking/refresh-bookings';
import { makeHandOut } from '@/lib/services/demonstration/make-hand-out';
import { eraseStaged } from '@/lib/services/import/erase-staged-rows';
import { expireSizeRequest } from '@/lib/services/size-request/end-size-request';
import { deliverMail } from '@/lib/services/mail/deliver-mail';
import { makeSheet } from '@/lib/services/plan-sheet/make-sheet';

/**
 * The process that does slow and outward work. A queued job is only a wake-up call: what is due is in our own tables,
 * and a sweep of them finds whatever a lost or expired job left behind.
 */
const SWEEP_SECONDS = Number(process.env.SELVEDGE_SWEEP_SECONDS ?? 5);

async function main(): Promise<void> {
  const { databaseUrl } = environment();
  await requireSchema();
  const transport = smtpTransport();
  const boss = new PgBoss({ connectionString: databaseUrl, max: 4, migrate: false, schedule: false });
  boss.on('error', (error) => console.error(`queue: ${error.message}`));
  // The queue notes down how a job ended without waiting for the answer. While the database is away that note is lost,
  // and the job with it: the sweep does what it would have done. Anything else that nobody caught still ends the process.
  process.on('unhandledRejection', (error) => {
    if (!(error instanceof Error) || !error.stack?.includes('pg-boss')) throw error;
    console.error(`queue: ${error.message}`);
  });
  await boss.start();

  const deliver = async (payload: JobPayload<'deliver-mail'>) => {
    const result = await deliverMail(payload, transport);
    if (result !== 'nothing to do') console.log(`mail ${payload.outboxId}: ${result}`);
  };
  await boss.work('deliver-mail', { batchSize: 5, pollingIntervalSeconds: 1 }, async (jobs) => {
    for (const job of jobs) await deliver(QUEUES['deliver-mail'].parse(job.data));
  });

  const paint = async (payload: JobPayload<'make-plan-sheet'>) => {
    const result = await makeSheet(payload, paintSheet);
    if (result !== 'nothing to do') console.log(`plan sheet ${payload.sheetId}: ${result}`);
  };
  await boss.work('make-plan-sheet', { batchSize: 1, pollingIntervalSeconds: 1 }, async (jobs) => {
    for (const job of jobs) await paint(QUEUES['make-plan-sheet'].parse(job.data));
  });

  const handOut = async (payload: JobPayload<'make-hand-out'>) => {
    const result = await makeHandOut(payload, paintHandOut);
    if (result !== 'nothing to do') console.log(`hand-out ${payload.handOutId}: ${result}`);
  };
  await boss.work('make-hand-out', { batchSize: 1, pollingIntervalSeconds: 1 }, async (jobs) => {
    for (const job of jobs) await handOut(QUEUES['make-hand-out'].parse(job.data));
  });

  await boss.work('refresh-bookings', { batchSize: 1, pollingIntervalSeconds: 1 }, async (jobs) => {
    for (const job of jobs) {
      const refreshed = await refreshBookings(QUEUES['refresh-bookings'].parse(job.data));
      console.log(`bookings worked out again: ${refreshed}`);
    }
  });

  await boss.work('erase-staged-rows', { batchSize: 1, pollingIntervalSeconds: 2 }, async (jobs) => {
    for (const job of jobs) await eraseStaged(QUEUES['erase-staged-rows'].parse(job.data));
  });

  let stopping = false;
  const sweep = async () => {
    for (const { siteId, id } of await dueWork('mail', 50)) {
      if (stopping) return;
      await deliver({ siteId, outboxId: id });
    }
    for (const { siteId, id } of await dueWork('plan-sheet', 10)) {
      if (stopping) return;
      await paint({ siteId, sheetId: id });
    }
    for (const { siteId, id } of await dueWork('hand-out', 10)) {
      if (stopping) return;
      await handOut({ siteId, handOutId: id });
    }
    for (const due of await dueWork('size-request-expiry', 50)) {
      if (stopping) return;
      if (await expireSizeRequest(due)) console.log(`size request ${due.id}: expired`);
    }
    for (const siteId of new Set((await dueWork('pre-check', 20)).map((due) => due.siteId))) {
      if (stopping) return;
      await refreshBookings({ siteId });
    }
  };
  let timer: NodeJS.Timeout | undefined;
  let sweeping: Promise<void> = Promise.resolve();
  const again = () => {
    timer = setTimeout(() => {
      sweeping = sweep()
        .catch((error: Error) => console.error(`sweep: ${error.message}`))
        .finally(() => !stopping && again());
    }, SWEEP_SECONDS * 1000);
  };
  again();
  console.log('working');

  const stop = async () => {
    if (stopping) return;
    stopping = true;
    clearTimeout(timer);
    await sweeping;
    await boss.stop({ graceful: true, timeout: 5000 });
    transport.close();
    await closeDatabase();
    process.exit(0);
  };
  process.on('SIGTERM', () => void stop());
  process.on('SIGINT', () => void stop());
}

await main().catch((error: Error) => {
  console.error(error.message);
  process.exit(1);
});
