import { sql } from 'kysely';
import { closeDatabase } from '@/db/client';
import { casesAsBooked } from '@/lib/domain/booking/assess-as-booked';
import { composePatient } from '@/lib/domain/size-reading/compose-patient';
import { preCheck } from '@/lib/domain/pre-check/pre-check';
import { assess } from '@/lib/physics';
import { refreshBookings } from '@/lib/services/booking/refresh-bookings';
import { readQuestion } from '@/lib/services/pre-check/read-question';
import { closeOwnerDatabase } from '@/tests/support/database/owner-database';
import { startThrowAwayCluster, TEMPLATE } from '@/tests/support/database/throw-away-cluster';
import { equipSite, sizeBooking, type EquippedSite } from '@/tests/support/equipped-site';
import { quantile, time, type Measure } from './row';

const SIZED = 40;
const MANY = 10_000;
const MB = 1_048_576;
/** A moment at which every booking made here is still to come and due. */
const NOW = new Date('2026-05-04T09:00:00Z');

/** Copies of the equipped site's booking, each with the sizes it has. */
async function copyBooking({ site, booking }: EquippedSite, count: number, prefix: string, sizes: boolean): Promise<void> {
  await site.withApp(async (trx) => {
    await sql`
      insert into booking (site_id, accession, scheduled_at, slot_minutes, body_region, booked_scanner_id, protocol_id, source)
      select site_id, ${prefix}::text || n, scheduled_at + n * interval '1 minute', slot_minutes, body_region, booked_scanner_id, protocol_id, source
      from booking, generate_series(1, ${count}::integer) n where id = ${booking.id}`.execute(trx);
    await sql`insert into booking_state (site_id, booking_id, changed_at, recheck_at) select site_id, id, ${NOW}, ${NOW} from booking where accession like ${`${prefix}%`}`.execute(trx);
    if (!sizes) return;
    await sql`
      insert into size_reading (site_id, booking_id, quantity, value, source, spread, taken_on, recorded_by, recorded_at)
      select r.site_id, b.id, r.quantity, r.value, r.source, r.spread, r.taken_on, r.recorded_by, r.recorded_at
      from size_reading r, booking b where r.booking_id = ${booking.id} and b.accession like ${`${prefix}%`}`.execute(trx);
  });
}

async function checkAll(here: EquippedSite): Promise<{ readonly count: number; readonly s: number; readonly peak: number }> {
  const begun = performance.now();
  let count = 0;
  let peak = 0;
  for (;;) {
    const done = await refreshBookings({ siteId: here.site.siteId }, NOW);
    if (done === 0) return { count, s: (performance.now() - begun) / 1000, peak };
    count += done;
    peak = Math.max(peak, process.memoryUsage().rss);
  }
}

/** Checks as the worker makes them, each read, worked out and stored in a transaction of its own. */
export const measure: Measure = async () => {
  const cluster = await startThrowAwayCluster();
  process.env.DATABASE_URL = cluster.url('app', TEMPLATE);
  process.env.MIGRATION_DATABASE_URL = cluster.url('owner', TEMPLATE);
  try {
    const sized = await equipSite();
    await sizeBooking(sized);
    await checkAll(sized);
    await copyBooking(sized, SIZED, 'CS-', true);
    const worked = await checkAll(sized);
    if (worked.count !== SIZED) throw new Error(`${worked.count} bookings were checked, ${SIZED} were expected.`);
    const { question } = (await sized.site.withApp((trx) => readQuestion(trx, sized.site.siteId, sized.booking.id)))!;
    const { patient } = composePatient({
      readings: question.readings, region: 'abdomen', tissueReachMm: question.scanner.document.scanner.tissueReachMm, policy: question.policy, now: question.booking.scheduledAt,
    });
    const cases = casesAsBooked({
      patient: patient!, protocol: question.protocol.document, sequences: question.protocol.sequences, scanner: question.scanner.document.scanner, policy: question.policy,
    });
    const bare = quantile(time(() => cases.forEach((one) => assess(structuredClone(one))), 30, 5), 0.5);
    const pure = quantile(time(() => preCheck(structuredClone(question)), 30, 5), 0.5);
    const each = (worked.s * 1000) / SIZED;

    const many = await equipSite();
    await checkAll(many);
    await copyBooking(many, MANY, 'CM-', false);
    const before = process.memoryUsage().rss;
    const through = await checkAll(many);
    if (through.count !== MANY) throw new Error(`${through.count} bookings were checked, ${MANY} were expected.`);
    return [
      { what: 'checks through the database, two sequences', value: 1000 / each, unit: 'checks/s' },
      { what: 'check through the database over the pure check', value: each / pure, unit: 'times', against: 'the same question; the rest is eight reads, three writes and the verdict of lists' },
      { what: 'check through the database over the bare engine', value: each / bare, unit: 'times', against: 'assess on the same sequences' },
      { what: '10,000 checks of bookings without sizes', value: MANY / through.s, unit: 'checks/s' },
      { what: 'memory grown over 10,000 checks', value: Math.max(0, through.peak - before) / MB, unit: 'MB', aim: 'below 200' },
    ];
  } finally {
    await closeDatabase();
    await closeOwnerDatabase();
    await cluster.stop();
  }
};
