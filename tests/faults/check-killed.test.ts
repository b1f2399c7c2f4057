import { type ChildProcess, spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeAll, describe, expect, it } from 'vitest';
import { createBooking } from '@/lib/services/booking/create-booking';
import { recheckBookings } from '@/lib/services/pre-check/recheck-bookings';
import { editScanner } from '@/lib/services/scanner/edit-scanner';
import { recordReadings } from '@/lib/services/size-reading/record-readings';
import { useOwnDatabase } from '@/tests/support/database';
import { as, equipSite, scannerForm, type EquippedSite } from '@/tests/support/equipped-site';
import { KNOWN } from '@/tests/support/pre-check-questions';
import { countOf, tally } from '@/tests/support/tally';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const KILLS = countOf('SELVEDGE_KILLS', 3);
const BOOKINGS = 8;

function startWorker(): ChildProcess {
  return spawn(process.execPath, ['--import', 'tsx', 'lib/ops/worker.ts'], {
    cwd: ROOT,
    env: { ...process.env, SMTP_URL: 'smtp://127.0.0.1:9', SELVEDGE_SWEEP_SECONDS: '0.1' },
    stdio: 'ignore',
  });
}

const gone = (child: ChildProcess) => new Promise<void>((resolve) => child.once('exit', () => resolve()));

describe('a worker that is killed outright', () => {
  let here: EquippedSite;
  let ids: string[];
  let worker: ChildProcess | undefined;

  beforeAll(async () => {
    await useOwnDatabase();
    here = await equipSite();
    ids = [here.booking.id];
    while (ids.length < BOOKINGS) {
      const made = await createBooking(as(here.coordinator), {
        accession: `AB-${3000 + ids.length}`, scheduledAt: '2026-05-05T10:40:00Z', slotMinutes: 40, scannerId: here.scanner.id, protocolId: here.protocol.id,
      });
      ids.push(made.id);
    }
    const readings = Object.entries(KNOWN).map(([quantity, value]) => ({ quantity, value, source: 'measured', spread: 0, takenOn: '2026-05-02' }));
    for (const bookingId of ids) await recordReadings(as(here.radiographer), { bookingId, readings });
  }, 120_000);
  afterEach(async () => {
    if (worker && worker.exitCode === null && worker.signalCode === null) {
      const ended = gone(worker);
      worker.kill('SIGKILL');
      await ended;
    }
  });

  const stale = async () =>
    (await here.site.withApp((trx) => trx.selectFrom('booking_state').select('booking_id').where('site_id', '=', here.site.siteId).where('stale', '=', 1).execute())).length;
  const checks = () =>
    here.site.withApp((trx) => trx.selectFrom('check_result').select(['booking_id', 'number', 'input_hash']).where('site_id', '=', here.site.siteId).execute());
  /** Asks the database until it says so; each question is a round trip, so this is no busy wait on a clock. */
  const until = async (holds: () => Promise<boolean>) => {
    while (!(await holds()));
  };

  it(`in the middle of checking loses no booking and writes no result twice (${KILLS} kills)`, async () => {
    for (let kill = 1; kill <= KILLS; kill++) {
      // Another opening: every booking gets a question it was not asked before.
      await editScanner(as(here.lead), { id: here.scanner.id, expectedVersion: kill, form: scannerForm({ boreDiameterMm: 700 + kill }) });
      await recheckBookings(as(here.coordinator), { bookingIds: ids });
      worker = startWorker();
      await until(async () => (await stale()) < BOOKINGS);
      const ended = gone(worker);
      worker.kill('SIGKILL');
      await ended;
      worker = startWorker();
      await until(async () => (await stale()) === 0);
      const stopped = gone(worker);
      worker.kill('SIGTERM');
      await stopped;
      const written = await checks();
      expect(written, `after kill ${kill}`).toHaveLength(BOOKINGS * kill);
      expect(new Set(written.map(({ booking_id, input_hash }) => `${booking_id} ${input_hash}`)).size).toBe(BOOKINGS * kill);
      for (const id of ids) expect(Math.max(...written.filter(({ booking_id }) => booking_id === id).map(({ number }) => number))).toBe(kill);
    }
    tally('worker killed in the middle of checking', KILLS, `${BOOKINGS} bookings each, one result for one question`);
  }, 60_000 + KILLS * 60_000);
});
