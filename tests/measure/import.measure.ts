import { randomUUID } from 'node:crypto';
import { sql } from 'kysely';
import { ImportSession } from '@/components/booking/import/import-session';
import { closeDatabase } from '@/db/client';
import { NO_SETTINGS } from '@/lib/domain/import';
import { commitImport } from '@/lib/services/import/commit-import';
import { stageRows } from '@/lib/services/import/stage-rows';
import { startImport } from '@/lib/services/import/start-import';
import { equipSite } from '@/tests/support/equipped-site';
import { closeOwnerDatabase } from '@/tests/support/database/owner-database';
import { startThrowAwayCluster, TEMPLATE } from '@/tests/support/database/throw-away-cluster';
import type { Measure } from './row';

const ROWS = 100_000;
const MB = 1_048_576;

const accession = (index: number) => `M${String.fromCharCode(65 + Math.floor(index / 10_000))}-${String(index % 10_000).padStart(4, '0')}`;

/** A file of 100,000 rows as a booking system would write it. */
function demoFile(): Blob {
  const lines = Array.from({ length: ROWS }, (_, index) => `Quarrington ${index};${accession(index)};${String(1 + (index % 28)).padStart(2, '0')}.01.2027;10:${String(index % 60).padStart(2, '0')};Room 2;Abdomen;${120 + (index % 80)},5;${165 + (index % 20)}`);
  return new Blob([['Patient name;Accession;Date;Time;Scanner;Protocol;Weight (kg);Height (cm)', ...lines].join('\n')]);
}

async function seconds<T>(work: () => Promise<T>): Promise<{ s: number; result: T }> {
  const begun = performance.now();
  const result = await work();
  return { s: (performance.now() - begun) / 1000, result };
}

/** Reading, staging and booking a large file, against one bare INSERT … SELECT of as many bookings in the same database. */
export const measure: Measure = async () => {
  const cluster = await startThrowAwayCluster();
  process.env.DATABASE_URL = cluster.url('app', TEMPLATE);
  process.env.MIGRATION_DATABASE_URL = cluster.url('owner', TEMPLATE);
  try {
    const here = await equipSite();
    const { siteId } = here.site;
    const bare = await equipSite();
    const insert = await seconds(() =>
      bare.site.withApp((trx) =>
        sql`insert into booking (site_id, accession, scheduled_at, slot_minutes, body_region, booked_scanner_id, protocol_id, source)
          select ${bare.site.siteId}::uuid, 'B' || n, now(), 45, 'abdomen', ${bare.scanner.id}::uuid, ${bare.protocol.id}::uuid, 'import'
          from generate_series(1, ${ROWS}) n`.execute(trx),
      ),
    );
    const actor = here.coordinator;
    const settings = {
      ...NO_SETTINGS,
      columns: { accession: 'Accession', day: 'Date', time: 'Time', scanner: 'Scanner', protocol: 'Protocol', weight: 'Weight (kg)', height: 'Height (cm)' },
      units: { weight: 'kg', height: 'cm' } as const,
      scanners: { 'room 2': here.scanner.id }, protocols: { abdomen: here.protocol.id },
    };
    const basis = { mask: '@@-####', zone: 'Europe/Berlin', slotMinutes: 45 };
    const file = demoFile();
    const importId = randomUUID();
    await startImport({ actor }, { id: importId, format: 'csv' });
    let peak = 0;
    let inServer = 0;
    const before = process.memoryUsage().rss;
    const session = new ImportSession({
      start: async () => {},
      stage: async (id, rows) => {
        const { s, result } = await seconds(() => stageRows({ actor }, { importId: id, rows }));
        inServer += s;
        peak = Math.max(peak, process.memoryUsage().rss);
        return result;
      },
      commit: async () => Promise.reject(new Error('not used')),
      cancel: async () => {},
    });
    await session.open(file);
    const staged = await seconds(() => session.stage(importId, settings, basis, () => {}));
    const { created, skipped } = session.counts();
    if (created !== ROWS || skipped !== 0) throw new Error(`${created} of ${ROWS} rows were read, ${skipped} left out.`);
    const committed = await seconds(() => commitImport({ actor }, { importId, expectedRows: ROWS }));
    const { rows } = await here.site.withApp((trx) => sql<{ made: number }>`select count(*)::integer as made from booking where site_id = ${siteId}`.execute(trx));
    if (rows[0]!.made !== ROWS + 1) throw new Error(`${rows[0]!.made} bookings are there, ${ROWS + 1} were expected.`);
    const rate = (s: number) => ROWS / s;
    return [
      { what: 'bare INSERT … SELECT of bookings', value: rate(insert.s), unit: 'rows/s' },
      { what: 'reading the file (CSV to rows)', value: rate(staged.s - inServer), unit: 'rows/s' },
      { what: 'staging and comparing', value: rate(inServer), unit: 'rows/s' },
      { what: 'booking, with states, two sizes and audit', value: rate(committed.s), unit: 'rows/s' },
      { what: 'booking against the bare insert', value: committed.s / insert.s, unit: 'times as long', against: 'one table instead of five', aim: 'below 20' },
      { what: 'the whole import', value: rate(staged.s + committed.s), unit: 'rows/s' },
      { what: 'memory grown while 100,000 rows went through', value: (peak - before) / MB, unit: 'MB', aim: 'below 300' },
    ];
  } finally {
    await closeDatabase();
    await closeOwnerDatabase();
    await cluster.stop();
  }
};
