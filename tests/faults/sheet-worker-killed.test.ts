import { type ChildProcess, spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeAll, expect, it, vi } from 'vitest';
import { countPages } from '@/components/plan/pdf/paint-sheet';
import { createDemonstration } from '@/lib/services/demonstration/create-demonstration';
import { getHandOut, getHandOutFile } from '@/lib/services/demonstration/get-hand-out';
import { requestHandOut } from '@/lib/services/demonstration/request-hand-out';
import { openBench } from '@/lib/services/booking/open-bench';
import { getSheet, getSheetFile } from '@/lib/services/plan-sheet/get-sheet';
import { requestSheet } from '@/lib/services/plan-sheet/request-sheet';
import { savePlan } from '@/lib/services/plan/save-plan';
import { useOwnDatabase } from '@/tests/support/database';
import { as, equipSite, sizeBooking, type EquippedSite } from '@/tests/support/equipped-site';
import { planBody } from '@/tests/support/plan-body';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));

let here: EquippedSite;
let worker: ChildProcess | undefined;
beforeAll(async () => {
  await useOwnDatabase();
  here = await equipSite();
});
afterEach(async () => {
  if (worker && worker.exitCode === null && worker.signalCode === null) await killed(worker);
});

/** The worker as "npm start" begins it; its sweep looks every 100 ms. */
function startWorker(): ChildProcess {
  return spawn(process.execPath, ['--import', 'tsx', 'lib/ops/worker.ts'], {
    cwd: ROOT,
    // No mail is due here; a mail server is only named.
    env: { ...process.env, SMTP_URL: 'smtp://127.0.0.1:9', SELVEDGE_SWEEP_SECONDS: '0.1' },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
}

const prints = (child: ChildProcess, words: string) =>
  new Promise<void>((resolve, reject) => {
    child.stdout!.on('data', (chunk: Buffer) => chunk.toString().includes(words) && resolve());
    child.once('exit', (code) => reject(new Error(`The worker ended with ${code}.`)));
  });

const killed = (child: ChildProcess) =>
  new Promise<void>((resolve) => {
    child.once('exit', () => resolve());
    child.kill('SIGKILL');
  });

/** Polled like the page that shows the progress. */
const stateOf = (planId: string, sheetId: string) => getSheet(as(here.radiographer), { planId, sheetId }).then(({ state }) => state);

it('a plan sheet and a hand-out asked for before their worker was killed are made by the next one, once and whole', async () => {
  await sizeBooking(here);
  const bench = await openBench(as(here.radiographer), { bookingId: here.booking.id });
  const plan = await savePlan(as(here.radiographer), planBody(bench));
  worker = startWorker();
  await prints(worker, 'working');
  const { id } = await requestSheet(as(here.radiographer), { planId: plan.id });
  const educator = as(await here.site.person('educator'));
  const demonstration = await createDemonstration(educator, { title: 'Shown', setPiece: 'half' });
  const handOut = { demonstrationId: demonstration.id, handOutId: (await requestHandOut(educator, { demonstrationId: demonstration.id })).id };
  // Wherever they were by then: not begun, in the middle, or done.
  await killed(worker);
  const before = await stateOf(plan.id, id);
  expect(['queued', 'done']).toContain(before);
  worker = startWorker();
  await vi.waitFor(async () => expect(await stateOf(plan.id, id)).toBe('done'), { timeout: 60_000, interval: 200 });
  await vi.waitFor(async () => expect((await getHandOut(educator, handOut)).state).toBe('done'), { timeout: 60_000, interval: 200 });
  expect(countPages(await getHandOutFile(educator, handOut))).toBe(2);
  const { bytes } = await getSheetFile(as(here.coordinator), { planId: plan.id, sheetId: id });
  expect(countPages(bytes)).toBe(1);
  expect(bytes.subarray(0, 5).toString()).toBe('%PDF-');
}, 120_000);
