import { type ChildProcess, spawn } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { fileURLToPath } from 'node:url';
import { sql } from 'kysely';
import { afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { database } from '@/db/client';
import { commitImport } from '@/lib/services/import/commit-import';
import type { ImportRow } from '@/lib/domain/import';
import { stageRows } from '@/lib/services/import/stage-rows';
import { startImport } from '@/lib/services/import/start-import';
import { equipSite, type EquippedSite } from '@/tests/support/equipped-site';
import type { ImportTask } from '@/tests/support/import-process';
import { countOf, tally } from '@/tests/support/tally';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const KILLS = countOf('SELVEDGE_KILLS', 3);
const gone = (child: ChildProcess) => new Promise<void>((resolve) => child.once('exit', () => resolve()));

let here: EquippedSite;
beforeAll(async () => {
  here = await equipSite();
});
let child: ChildProcess | undefined;
afterEach(() => void child?.kill('SIGKILL'));

function start(task: ImportTask): ChildProcess {
  child = spawn(process.execPath, ['--import', 'tsx', 'tests/support/import-process.ts', JSON.stringify(task)], { cwd: ROOT, env: process.env, stdio: 'ignore' });
  return child;
}

/** Until some process of this database waits for a lock that the test holds; asked as the same login, which alone may see that. */
const untilBlocked = () =>
  vi.waitUntil(
    async () => {
      const { rows } = await sql<{ blocked: number }>`
        select count(*)::integer as blocked from pg_stat_activity
        where datname = current_database() and wait_event_type = 'Lock'`.execute(database());
      return rows[0]!.blocked > 0;
    },
    { timeout: 30_000, interval: 50 },
  );

const row = (number: number, accession: string, slotMinutes = 40): ImportRow => ({
  number, accession, slotMinutes, scheduledAt: '2026-06-01T08:00:00.000Z', scannerId: here.scanner.id, protocolId: here.protocol.id,
  readings: [{ quantity: 'weight-kg', value: 140, source: 'reported', takenOn: '2026-05-01' }],
});
const stored = () =>
  here.site.withApp(async (trx) => {
    const { rows } = await sql`
      select (select json_agg(json_build_array(accession, slot_minutes, version) order by accession) from booking where site_id = ${here.site.siteId}) as bookings,
        (select count(*)::integer from size_reading where site_id = ${here.site.siteId}) as readings,
        (select count(*)::integer from booking_state where site_id = ${here.site.siteId}) as states,
        (select count(*)::integer from audit_event where site_id = ${here.site.siteId} and action = 'booking.import') as audited`.execute(trx);
    return rows[0];
  });

/** Kills the child while it waits for a row that this transaction holds. */
async function killWhileHolding(hold: ReturnType<typeof sql>, task: ImportTask): Promise<void> {
  await here.site.withApp(async (trx) => {
    await hold.execute(trx);
    const running = start(task);
    await untilBlocked();
    const ended = gone(running);
    running.kill('SIGKILL');
    await ended;
  });
}

describe('an import whose process is killed outright', () => {
  it(`in the middle of a commit has done nothing, and can be committed after (${KILLS} kills)`, async () => {
    const { actor } = { actor: here.coordinator };
    for (let kill = 1; kill <= KILLS; kill += 1) {
      const known = `KC-${1000 + kill}`;
      const first = randomUUID();
      await startImport({ actor }, { id: first, format: 'csv' });
      await stageRows({ actor }, { importId: first, rows: [row(1, known)] });
      await commitImport({ actor }, { importId: first, expectedRows: 1 });
      const before = await stored();

      const importId = randomUUID();
      const rows = [row(2, `KD-${1000 + kill}`), row(3, `KE-${1000 + kill}`), row(4, known, 55)];
      // By the time it wants to change the booking that is held, it has made the new ones.
      await killWhileHolding(
        sql`select id from booking where site_id = ${here.site.siteId} and accession = ${known} for update`,
        { actor, importId, pieces: [rows], expectedRows: 3 },
      );
      expect(await stored(), `after kill ${kill}`).toEqual(before);

      expect(await commitImport({ actor }, { importId, expectedRows: 3 })).toMatchObject({ created: 2, changed: 1, same: 0 });
      expect(await commitImport({ actor }, { importId, expectedRows: 3 })).toMatchObject({ created: 2, changed: 1, same: 0 });
      const after = await stored();
      expect(after).toMatchObject({
        readings: (before as { readings: number }).readings + 2, states: (before as { states: number }).states + 2, audited: (before as { audited: number }).audited + 4,
      });
    }
    tally('import killed in the middle of its commit', KILLS, 'nothing half done');
  }, 60_000 + KILLS * 30_000);

  it(`in the middle of staging goes on where it was, no row lost or doubled (${KILLS} kills)`, async () => {
    const actor = here.coordinator;
    for (let kill = 1; kill <= KILLS; kill += 1) {
      const importId = randomUUID();
      const pieces = [[row(1, `KF-${1000 + kill}`)], [row(2, `KG-${1000 + kill}`)]];
      await startImport({ actor }, { id: importId, format: 'csv' });
      await stageRows({ actor }, { importId, rows: pieces[0] });
      const before = await stored();
      await killWhileHolding(
        sql`select id from import_batch where site_id = ${here.site.siteId} and id = ${importId} for update`,
        { actor, importId, pieces },
      );
      expect(await stored(), `after kill ${kill}`).toEqual(before);
      for (const rows of pieces) await stageRows({ actor }, { importId, rows });
      expect(await commitImport({ actor }, { importId, expectedRows: 2 })).toMatchObject({ created: 2, changed: 0, same: 0 });
    }
    tally('import killed in the middle of staging', KILLS, 'no row lost or doubled');
  }, 60_000 + KILLS * 30_000);
});
